import { ticksCautions, ticksFound, ticksSays } from '../../results/ticks';
import { flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const freeNote: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: flightWarnings,
  analyse: (question) => ticksFound(question, 'term'),
  verdict: ticksSays,
  cautions: (found) => [...ticksCautions(found), 'What nobody wrote was not shown to be absent: people write what strikes them.'],
};
