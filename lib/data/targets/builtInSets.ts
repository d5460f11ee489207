import type { TargetList } from '@/lib/schemas/targets';

/** The published sets that come with the program. */
export const builtInSets = (): TargetList['builtIn'] => [];
