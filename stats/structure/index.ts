export * from './pca';
export * from './ellipse';
export * from './panel-ellipses';
export * from './mfa';
export * from './procrustes';
export * from './ward';
