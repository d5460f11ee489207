import type { Metadata } from 'next';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { can } from '@/lib/access/table';
import { getMailPreferences } from '@/lib/data/mail/preferences';
import { listDue } from '@/lib/data/reminders/listDue';
import { listRules } from '@/lib/data/reminders/listRules';
import { getSite } from '@/lib/data/sites/getSite';
import { RemindersBoard } from './_components/reminders-board';

export const metadata: Metadata = { title: 'Reminders' };

export default async function RemindersPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/reminders`);
  const { role } = await orNotFound(getSite({ ctx, input: { siteId } }));
  const due = await listDue({ ctx, input: { siteId } });
  const rules = await listRules({ ctx, input: { siteId } });
  const { preferences } = await getMailPreferences({ ctx, input: {} });
  return (
    <RemindersBoard
      siteId={siteId}
      first={{ due, rules: rules.rules }}
      mayEdit={can(role, 'ground.edit')}
      mail={{
        reachesYou: can(role, 'reminder.already-sampled'),
        wanted: preferences.find((one) => one.kind === 'reminder')?.wanted ?? true,
        hour: person.mailHour,
        timeZone: person.timeZone,
      }}
    />
  );
}
