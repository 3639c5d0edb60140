import { CHANCE, PAIR_ORDERS } from '@/stats';
import { pairCautions, pairFound, pairSays } from '../../results/pair';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const preference: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(PAIR_ORDERS, question, draw),
  warnings: (question) => setWarnings(PAIR_ORDERS, question, CHANCE.two_afc),
  analyse: (question) => pairFound(question, 'liked'),
  verdict: pairSays,
  cautions: pairCautions,
};
