export * from './williams';
export * from './balance';
export * from './orders';
export * from './block-parameters';
export * from './incomplete-blocks';
export * from './plans';
