import { createTargetSetInput, type OwnTargetSet } from '@/lib/schemas/targets';
import { siteVerb } from '../verb';
import { writeTargetSet } from './writeTargetSet';

export const createTargetSet = siteVerb({
  act: 'ground.edit',
  input: createTargetSetInput,
  run: async (tools): Promise<OwnTargetSet> => {
    const key = `own-${Buffer.from(tools.ctx.random(9)).toString('base64url')}`;
    const written = await writeTargetSet(tools, key, 1, tools.input);
    await tools.audit({ act: 'targets.create', objectKind: 'target-set', objectId: written.id, detail: { key } });
    return written;
  },
});
