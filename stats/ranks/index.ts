export * from './midranks';
export * from './concordance';
export * from './friedman';
export * from './friedman-exact';
export * from './page';
export * from './rank-sums';
export * from './incomplete';
export * from './durbin';
