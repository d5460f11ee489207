import { MATERIALS } from './catalogue';
import type { Material } from './types';

export { citation } from '../sources';
export { MATERIALS } from './catalogue';
export { suggestIntendedChange, type Texture } from './suggest';
export type { Material } from './types';

const BY_KEY: ReadonlyMap<string, Material> = new Map(MATERIALS.map((entry) => [entry.key, entry]));

export function material(key: string): { ok: true; material: Material } | { ok: false; reason: 'no-such-material' } {
  const entry = BY_KEY.get(key);
  return entry === undefined ? { ok: false, reason: 'no-such-material' } : { ok: true, material: entry };
}
