import { TZDate } from '@date-fns/tz';
import { format } from 'date-fns';
import { asDay, type Day } from '@/lib/domain/days';

/** Which day it is in a zone at a moment. */
export const dayOf = (moment: Date, timeZone: string): Day =>
  asDay(format(new TZDate(moment.getTime(), timeZone), 'yyyy-MM-dd'));

/** Hour of the day there, 0 to 23. */
export const hourOf = (moment: Date, timeZone: string): number => new TZDate(moment.getTime(), timeZone).getHours();
