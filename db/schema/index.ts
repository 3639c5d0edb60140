export * from './identity';
export * from './cellar';
export * from './lexicon';
export * from './sessions';
export * from './evidence';
export * from './calls';
