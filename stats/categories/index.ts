export { mcnemar, mcnemarOfAnswers, type McnemarResult } from './mcnemar';
export * from './cochran-q';
export * from './wilcoxon';
export * from './just-about-right';
export * from './paired-preference';
export * from './correspondence';
