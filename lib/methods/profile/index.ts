import { profileFound, profileCautions, profileSays } from '../../results/profile-family';
import { flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const profile: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [
    ...flightWarnings(question),
    ...(question.replicates === 1 ? ['With one replicate the panel’s repeatability can’t be told from its disagreement.'] : []),
    ...(question.seatCount < 8 ? ['Profiles are usually scored by 8 to 12 trained panelists; fewer show large differences only.'] : []),
  ],
  analyse: (question) => profileFound(question, { kind: 'line', low: 0, high: 100 }),
  verdict: profileSays,
  cautions: profileCautions,
};
