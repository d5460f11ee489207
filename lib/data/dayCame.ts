import { addDays } from '@/lib/domain/days';
import { Problem } from '@/lib/errors';
import type { Ctx, SignedIn } from './context';
import { dayOf } from './days';

/** Tomorrow is still taken: somewhere it has begun. */
export function assertDayCame(ctx: Ctx, person: SignedIn, day: string | null | undefined, field: string): void {
  if (!day || day <= addDays(dayOf(ctx.now, person.timeZone), 1)) return;
  const sentence = 'This day has not come yet. Is the year right?';
  throw new Problem('invalid', sentence, { fields: { [field]: sentence } });
}
