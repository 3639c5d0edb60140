import { CHANCE, duoTrioConstantOrders } from '@/stats';
import { choiceCautions, choiceFound, choiceSays } from '../../results/choice';
import { planSets, setWarnings } from '../set-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const duoTrioConstant: MethodDescription = {
  facts,
  plan: (question, draw) => planSets(duoTrioConstantOrders((question.reference ?? 1) - 1), question, draw),
  warnings: (question) => setWarnings(duoTrioConstantOrders(0), question, CHANCE.duo_trio),
  analyse: (question) => choiceFound(question, 'duo_trio', 2),
  verdict: choiceSays,
  cautions: choiceCautions,
};
