export { checkEffect } from './check';
export { compareTests } from './compare';
export { noiseClassOf } from './noise-defaults';
export * from './types';
