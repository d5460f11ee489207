import type { TargetList } from '@/lib/schemas/targets';
import { BandList } from './band-list';

export function BuiltInSets({ sets }: { sets: TargetList['builtIn'] }) {
  return (
    <ul className="grid gap-6">
      {sets.map((set) => (
        <li key={set.key} className="grid max-w-3xl gap-1">
          <h3 className="text-lg">{set.name}</h3>
          <BandList bands={set.bands} />
          <p className="max-w-measure text-sm text-clay">Source: {set.source}</p>
          <p className="max-w-measure text-sm text-clay">Not in it: {set.gaps}</p>
        </li>
      ))}
    </ul>
  );
}
