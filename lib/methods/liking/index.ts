import { profileFound, profileCautions, profileSays } from '../../results/profile-family';
import { fewPeopleWarning, flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const liking: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [...flightWarnings(question), ...fewPeopleWarning(question, 60, 'Liking')],
  analyse: (question) => profileFound(question, { kind: 'liking', low: 1, high: 9 }),
  verdict: profileSays,
  cautions: (found) => [...profileCautions(found), 'Liking by people of the cellar is not liking by those who buy: it says nothing of a market.'],
};
