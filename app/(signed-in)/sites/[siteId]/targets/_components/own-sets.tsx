import type { OwnTargetSet } from '@/lib/schemas/targets';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { dayText } from '@/lib/ui/site-plan/measure';
import { BandList } from './band-list';

type OwnSetsProps = {
  readonly siteId: string;
  readonly sets: readonly OwnTargetSet[];
  readonly mayEdit: boolean;
};

export function OwnSets({ siteId, sets, mayEdit }: OwnSetsProps) {
  return (
    <ul className="grid gap-6">
      {sets.map((set) => (
        <li key={set.key} className="grid max-w-3xl gap-1">
          <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
            <div className="min-w-0">
              <h3 className="text-lg break-words">{set.name}</h3>
              <p className="text-sm text-clay">
                in force since {dayText(set.validFrom)}, version {set.version}
              </p>
            </div>
            {mayEdit ? (
              <LinkButton look="quiet" href={`/sites/${siteId}/targets/${set.key}`}>
                Edit<span className="sr-only"> {set.name}</span>
              </LinkButton>
            ) : null}
          </div>
          <BandList bands={set.bands} />
        </li>
      ))}
    </ul>
  );
}
