export * from './midranks';
export * from './concordance';
