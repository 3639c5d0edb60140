export { lsdComparisons, tukeyComparisons, type Comparisons, type Pair, type PairQuestion } from './pairs';
export { compactLetters } from './letters';
export { meanHalfWidth } from './mean-limits';
