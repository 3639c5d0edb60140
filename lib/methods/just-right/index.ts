import { rightCautions, rightFound, rightSays } from '../../results/just-right';
import { fewPeopleWarning, flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const justRight: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [...flightWarnings(question), ...fewPeopleWarning(question, 60, 'Just about right')],
  analyse: rightFound,
  verdict: rightSays,
  cautions: rightCautions,
};
