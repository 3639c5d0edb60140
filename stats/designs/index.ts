export * from './williams';
export * from './balance';
export * from './orders';
