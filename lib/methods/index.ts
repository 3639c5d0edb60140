import type { Method } from '@/db/enums';
import { categoryProfile } from './category-profile';
import { checkAll } from './check-all';
import { directionalPair } from './directional-pair';
import { duoTrio } from './duo-trio';
import { duoTrioConstant } from './duo-trio-constant';
import { freeNote } from './free-note';
import { justRight } from './just-right';
import { liking } from './liking';
import { preference } from './preference';
import { profile } from './profile';
import { ranking } from './ranking';
import { rateAll } from './rate-all';
import { tetrad } from './tetrad';
import { triangle } from './triangle';
import { twoOfFive } from './two-of-five';
import type { MethodDescription } from './types';

/** The methods that a session can have. A further one is a folder, a line here and one in `facts.ts`. */
export const METHOD_REGISTRY: Record<Method, MethodDescription> = {
  profile, category_profile: categoryProfile, check_all: checkAll, rate_all: rateAll, just_right: justRight, liking, free_note: freeNote, ranking,
  triangle, tetrad, duo_trio: duoTrio, duo_trio_constant: duoTrioConstant, directional_pair: directionalPair, preference, two_of_five: twoOfFive,
};

export const methodOf = (method: Method): MethodDescription => METHOD_REGISTRY[method];
