import { CHANCE, TRIANGLE_ORDERS } from '@/stats';
import { choiceCautions, choiceFound, choiceSays } from '../../results/choice';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const triangle: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(TRIANGLE_ORDERS, question, draw),
  warnings: (question) => setWarnings(TRIANGLE_ORDERS, question, CHANCE.triangle),
  analyse: (question) => choiceFound(question, 'triangle', TRIANGLE_ORDERS.length),
  verdict: choiceSays,
  cautions: choiceCautions,
};
