import { CHANCE, TETRAD_ORDERS } from '@/stats';
import { choiceCautions, choiceFound, choiceSays } from '../../results/choice';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const tetrad: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(TETRAD_ORDERS, question, draw),
  warnings: (question) => setWarnings(TETRAD_ORDERS, question, CHANCE.tetrad),
  analyse: (question) => choiceFound(question, 'tetrad', TETRAD_ORDERS.length),
  verdict: choiceSays,
  cautions: choiceCautions,
};
