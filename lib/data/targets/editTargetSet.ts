import { notFound, Problem } from '@/lib/errors';
import { editTargetSetInput, type OwnTargetSet } from '@/lib/schemas/targets';
import { isUniqueViolation } from '../transaction';
import { siteVerb } from '../verb';
import { loadOwnSets } from './loadOwnSets';
import { writeTargetSet } from './writeTargetSet';

const stale = (current: OwnTargetSet | undefined) =>
  new Problem('conflict', 'Somebody saved a newer version of this target set. Yours was not saved; compare the two.', {
    reason: 'stale-version',
    current,
  });

/** An edit is a new version from a day on. The unique key (site, key, version) lets one of two editors win. */
export const editTargetSet = siteVerb({
  act: 'ground.edit',
  input: editTargetSetInput,
  run: async (tools): Promise<OwnTargetSet> => {
    const { tx, siteId, audit } = tools;
    const { targetKey, version, ...facts } = tools.input;
    const [newest] = await loadOwnSets(tx, siteId, targetKey);
    if (!newest) throw notFound();
    if (newest.version !== version) throw stale(newest);
    const written = await writeTargetSet(tools, targetKey, version + 1, facts).catch((error: unknown) => {
      throw isUniqueViolation(error) ? stale(undefined) : error;
    });
    const detail = { key: targetKey, version: version + 1 };
    await audit({ act: 'targets.edit', objectKind: 'target-set', objectId: written.id, detail });
    return written;
  },
});
