export { logBeta, logChoose, logGamma } from './gamma';
export { normalCdf, normalLogCdf, normalPdf, normalQuantile, normalSf } from './normal';
export { tCdf, tQuantile, tSf, tTwoSided } from './t';
export { fCdf, fQuantile, fSf } from './f';
export { chiSquareCdf, chiSquareQuantile, chiSquareSf } from './chi-square';
export { betaCdf, betaQuantile, betaSf } from './beta';
export { binomialCdf, binomialPmf, binomialSf } from './binomial';
export { gaussLegendre, type Quadrature } from './quadrature';
export { studentizedRangeCdf, studentizedRangeQuantile, studentizedRangeSf, studentizedRangeTail } from './studentized-range';
