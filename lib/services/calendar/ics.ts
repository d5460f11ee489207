import ical, { ICalCalendarMethod, ICalEventStatus, ICalEventTransparency } from 'ical-generator';

export interface ResampleCalendarInput {
  /** Stable for the life of the reminder: the same id on every change and on cancelling. */
  readonly uid: string;
  /** Goes up by one on every change. */
  readonly sequence: number;
  readonly plotName: string;
  readonly siteName: string;
  /** ISO day */
  readonly dueOn: string;
  /** The moment this version was made. */
  readonly stamp: Date;
  readonly cancelled: boolean;
}

const PRODUCT = { company: 'Loamline', product: 'Reminders', language: 'EN' } as const;

/**
 * The calendar file of one resample day (RFC 5545): a whole day without zone, so that it is the same day everywhere; CRLF
 * line ends; lines folded at 75 octets. It is published, not sent as a meeting request, so nobody is asked to answer.
 */
export function resampleCalendar(input: ResampleCalendarInput): string {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(input.dueOn))
    throw new RangeError('The due day must be an ISO day such as 2026-05-20.');
  const plot = input.plotName.replace(/\s+/g, ' ').trim();
  const site = input.siteName.replace(/\s+/g, ' ').trim();
  const calendar = ical({ prodId: PRODUCT, method: ICalCalendarMethod.PUBLISH });
  calendar.createEvent({
    id: input.uid,
    sequence: input.sequence,
    stamp: input.stamp,
    // All-day events are written from the UTC parts of this moment, whatever the zone of the machine.
    start: new Date(`${input.dueOn}T00:00:00Z`),
    allDay: true,
    summary: `Soil sample: ${plot}`,
    location: site,
    description: `Take the soil sample of ${plot} (${site}): same depth, same laboratory and method as last time.`,
    transparency: ICalEventTransparency.TRANSPARENT,
    status: input.cancelled ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED,
  });
  return calendar.toString();
}
