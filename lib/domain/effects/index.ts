export { checkEffect, RULE_VERSION } from './check';
export { type Comparability, comparable, sameLaboratory } from './comparable';
export { compareTests } from './compare';
export { intendedBy, reactedShare } from './intended';
export { questionablePairs } from './learn';
export { type NoiseClassKey, noiseClassOf } from './noise-defaults';
export { judgingWindow } from './select';
export * from './types';
