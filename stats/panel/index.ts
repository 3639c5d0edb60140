export { assessorPerformance, type AssessorPerformance } from './performance';
export { intraclassCorrelations, type Icc, type IccForms } from './icc';
export { pearson } from './pearson';
