import { ticksCautions, ticksFound, ticksSays } from '../../results/ticks';
import { fewPeopleWarning, flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const checkAll: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [...flightWarnings(question), ...fewPeopleWarning(question, 60, 'Checking what applies')],
  analyse: (question) => ticksFound(question, 'check'),
  verdict: ticksSays,
  cautions: ticksCautions,
};
