/** The one public face of the statistics: every function, table and type that other code may use. */
export { StatsError, type StatsErrorCode } from './errors';
export * from './distributions';
export * from './designs';
export * from './discrimination';
export * from './ranks';
export * from './categories';
export * from './structure';
export * from './anova';
export * from './mixed';
export * from './comparisons';
export * from './panel';
export * from './cellar';
