import { CHANCE, DUO_TRIO_BALANCED_ORDERS } from '@/stats';
import { choiceCautions, choiceFound, choiceSays } from '../../results/choice';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const duoTrio: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(DUO_TRIO_BALANCED_ORDERS, question, draw),
  warnings: (question) => setWarnings(DUO_TRIO_BALANCED_ORDERS, question, CHANCE.duo_trio),
  analyse: (question) => choiceFound(question, 'duo_trio', DUO_TRIO_BALANCED_ORDERS.length),
  verdict: choiceSays,
  cautions: choiceCautions,
};
