export { balancedScores, type BalancedScores, type LongScores } from './balanced-scores';
export { profileAnova, type AnovaLine, type ProfileAnova, type TestedLine } from './profile-anova';
export { mixedAssessorModel, type MixedAssessorModel } from './mixed-assessor';
export { oneWayAnova, type OneWayAnova } from './one-way';
export { twoWayTypes, type SumOfSquares, type TwoWaySplit, type TwoWayTypes } from './two-way-types';
