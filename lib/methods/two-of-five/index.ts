import { CHANCE, TWO_OUT_OF_FIVE_ORDERS } from '@/stats';
import { choiceCautions, choiceFound, choiceSays } from '../../results/choice';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const twoOfFive: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(TWO_OUT_OF_FIVE_ORDERS, question, draw),
  warnings: (question) => setWarnings(TWO_OUT_OF_FIVE_ORDERS, question, CHANCE.two_out_of_five),
  analyse: (question) => choiceFound(question, 'two_out_of_five', TWO_OUT_OF_FIVE_ORDERS.length),
  verdict: choiceSays,
  cautions: choiceCautions,
};
