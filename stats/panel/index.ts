export { assessorPerformance, type AssessorPerformance } from './performance';
export { intraclassCorrelations, type Icc, type IccForms } from './icc';
export { pearson } from './pearson';
export { krippendorffAlpha, type KrippendorffAlpha, type Metric } from './krippendorff';
export { linConcordance, type LinConcordance } from './lin';
export { rvCoefficient } from './rv';
export { steadyMean } from './steady-mean';
