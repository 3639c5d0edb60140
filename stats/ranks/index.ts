export { midranks } from './midranks';
export { kendallW, type Concordance } from './concordance';
export { friedman, friedmanFromRankSums, type FriedmanResult } from './friedman';
export { friedmanCriticalValue, friedmanPermutation, type FriedmanPermutation, type PermutationOptions } from './friedman-exact';
export { page, pageCriticalL, type PageResult } from './page';
export { compareRankSums, conoverLsd, rankSumHsd, rankSumLsd, type RankSumComparison, type RankSumPair } from './rank-sums';
export { incompleteRankTest, type IncompleteRankResult } from './incomplete';
export { durbin, durbinLsd, type DurbinResult } from './durbin';
