export * from './sulphur-dioxide';
export * from './alcohol';
export * from './blend';
export * from './conversions';
export * from './trend';
