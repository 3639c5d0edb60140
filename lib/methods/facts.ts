import type { Method } from '@/db/enums';
import { facts as categoryProfile } from './category-profile/facts';
import { facts as checkAll } from './check-all/facts';
import { facts as directionalPair } from './directional-pair/facts';
import { facts as duoTrio } from './duo-trio/facts';
import { facts as duoTrioConstant } from './duo-trio-constant/facts';
import { facts as freeNote } from './free-note/facts';
import { facts as justRight } from './just-right/facts';
import { facts as liking } from './liking/facts';
import { facts as preference } from './preference/facts';
import { facts as profile } from './profile/facts';
import { facts as ranking } from './ranking/facts';
import { facts as rateAll } from './rate-all/facts';
import { facts as tetrad } from './tetrad/facts';
import { facts as triangle } from './triangle/facts';
import { facts as twoOfFive } from './two-of-five/facts';
import type { MethodFacts } from './types';

/** What forms and screens know of each method. Plain data: it may reach a browser, the plans and analyses don't. */
export const METHOD_FACTS: Record<Method, MethodFacts> = {
  profile, category_profile: categoryProfile, check_all: checkAll, rate_all: rateAll, just_right: justRight, liking, free_note: freeNote, ranking,
  triangle, tetrad, duo_trio: duoTrio, duo_trio_constant: duoTrioConstant, directional_pair: directionalPair, preference, two_of_five: twoOfFive,
};

export const factsOf = (method: Method): MethodFacts => METHOD_FACTS[method];
