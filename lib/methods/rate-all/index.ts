import { profileFound, profileCautions, profileSays } from '../../results/profile-family';
import { fewPeopleWarning, flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const rateAll: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [...flightWarnings(question), ...fewPeopleWarning(question, 40, 'Rating what applies')],
  analyse: (question) => profileFound(question, { kind: 'rate', low: 0, high: 3, absent: 0 }),
  verdict: profileSays,
  cautions: profileCautions,
};
