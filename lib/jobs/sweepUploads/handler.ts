import type { Ctx } from '@/lib/data/context';
import { requeueUploads } from '@/lib/data/reports/requeueUploads';
import { log } from '@/lib/log';

/** Reports that nobody reads any more are asked for again. */
export async function sweepUploads(ctx: Ctx): Promise<void> {
  const asked = await requeueUploads({ ctx, input: {} });
  if (asked > 0) log().info({ asked }, 'reports asked for again');
}
