import ICAL from 'ical.js';
import { describe, expect, it } from 'vitest';
import { type ResampleCalendarInput, resampleCalendar } from './ics';

const input: ResampleCalendarInput = {
  uid: 'reminder-5@loamline.example',
  sequence: 0,
  plotName: 'North bed; east, half',
  siteName: 'Tern Lane Growers',
  dueOn: '2026-05-20',
  stamp: new Date('2026-05-06T06:30:00Z'),
  cancelled: false,
};

/** Read back by another library. */
function readBack(text: string) {
  const calendar = new ICAL.Component(ICAL.parse(text));
  const component = calendar.getFirstSubcomponent('vevent');
  if (component === null) throw new Error('no event in the file');
  return { calendar, component, event: new ICAL.Event(component) };
}

describe('resampleCalendar', () => {
  it('is one whole day, published', () => {
    const text = resampleCalendar(input);
    const { calendar, component, event } = readBack(text);
    expect(text).toContain('DTSTART;VALUE=DATE:20260520\r\n');
    expect(event.startDate.isDate).toBe(true);
    expect(event.startDate.toString()).toBe('2026-05-20');
    expect(calendar.getFirstPropertyValue('method')).toBe('PUBLISH');
    expect(component.getFirstPropertyValue('status')).toBe('CONFIRMED');
    expect(String(component.getFirstPropertyValue('dtstamp'))).toBe('2026-05-06T06:30:00Z');
  });

  it('gives names back unharmed, commas, semicolons and letters beyond ASCII included', () => {
    const { event } = readBack(resampleCalendar({ ...input, plotName: 'Büschel; a, b \\ c' }));
    expect(event.summary).toBe('Soil sample: Büschel; a, b \\ c');
  });

  it('keeps its id, raises its sequence and can be cancelled', () => {
    const { component, event } = readBack(resampleCalendar({ ...input, sequence: 3, cancelled: true }));
    expect(event.uid).toBe(input.uid);
    expect(event.sequence).toBe(3);
    expect(component.getFirstPropertyValue('status')).toBe('CANCELLED');
  });

  it('ends every line in CRLF and folds at 75 octets', () => {
    const text = resampleCalendar({ ...input, plotName: 'Süßkartoffelfläche am Bach '.repeat(6) });
    expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
    for (const line of text.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
  });

  it('does not let a name add lines of its own', () => {
    const text = resampleCalendar({ ...input, plotName: 'a\r\nATTENDEE:mailto:x@example.org' });
    const { component } = readBack(text);
    expect(component.getAllProperties('attendee')).toHaveLength(0);
  });

  it('refuses a day that is none', () => {
    expect(() => resampleCalendar({ ...input, dueOn: '20 May 2026' })).toThrow(RangeError);
  });

  it.each(['Pacific/Apia', 'America/New_York', 'Asia/Kathmandu'])('is the same day on a machine in %s', (zone) => {
    const before = process.env.TZ;
    process.env.TZ = zone;
    try {
      expect(resampleCalendar(input)).toContain('DTSTART;VALUE=DATE:20260520\r\n');
    } finally {
      if (before === undefined) delete process.env.TZ;
      else process.env.TZ = before;
    }
  });
});
