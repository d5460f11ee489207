import type { TargetList } from '@/lib/schemas/targets';
import type { Option } from '@/lib/ui/fields/select-field';

/** Built-in sets first, then the site's own; a key that is no longer listed stays choosable, so that a save keeps it. */
export function targetOptions(targets: TargetList, ...kept: readonly (string | null | undefined)[]): Option[] {
  const options = [
    ...targets.builtIn.map((set) => ({ value: set.key, label: set.name })),
    ...targets.own.map((set) => ({ value: set.key, label: `${set.name} (own)` })),
  ];
  const missing = kept.filter((key): key is string => Boolean(key) && !options.some((option) => option.value === key));
  return [...options, ...[...new Set(missing)].map((key) => ({ value: key, label: `${key} (no longer listed)` }))];
}
