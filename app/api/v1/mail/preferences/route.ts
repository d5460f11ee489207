import { z } from 'zod';
import { getMailPreferences, setMailPreference } from '@/lib/data/mail/preferences';
import { mailPreferencesAnswer } from '@/lib/schemas/reminders';
import { route } from '../../_route';

const one = z.object({ kind: z.string(), wanted: z.boolean() });

export const GET = route({
  verb: getMailPreferences,
  answer: mailPreferencesAnswer,
  summary: 'Which optional mail you get',
});
export const PUT = route({ verb: setMailPreference, answer: one, summary: 'Choose one kind of optional mail' });
