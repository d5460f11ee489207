import Link from 'next/link';
import { Notice } from '@/lib/ui/feedback/notice';
import { Stretch } from '@/lib/ui/frame/layers';
import { DefinitionList } from '@/lib/ui/show/definition-list';

export type MailFacts = {
  /** By the role: viewers read the list and get no mail. */
  reachesYou: boolean;
  /** By the person's own choice. */
  wanted: boolean;
  hour: number;
  timeZone: string;
};

export function WhenMailComes({ mail }: { mail: MailFacts }) {
  const from = `${String(mail.hour).padStart(2, '0')}:00`;
  return (
    <Stretch title="When mail comes">
      {!mail.reachesYou ? (
        <p className="max-w-measure">
          As a viewer you get no reminder mail; those who work on this site do. What is due stands here and on your
          first page.
        </p>
      ) : (
        <div className="grid gap-5">
          {mail.wanted ? null : (
            <Notice tone="look" title="Reminder mail is switched off for you">
              What is due still stands here and on your first page.{' '}
              <Link href="/account#mail" className="text-link">
                Switch it on in your settings
              </Link>
              .
            </Notice>
          )}
          <DefinitionList
            items={[
              {
                term: 'Three times',
                said: 'Two weeks before the day, on the day, and two weeks after',
                note: 'It ends as soon as somebody presses “Already sampled” or the new test is confirmed.',
              },
              {
                term: 'At your hour',
                said: `From ${from}, ${mail.timeZone.replaceAll('_', ' ')}`,
                note: 'At most one mail a day, with all your plots and sites in it, and an entry for your calendar.',
              },
              {
                term: 'Off again',
                said: 'One press in the mail itself, or in your settings',
                note: 'It ends the mail for you alone; the others on this site still get theirs.',
              },
            ]}
          />
          <p>
            <Link href="/account#mail" className="text-link inline-flex min-h-(--target) items-center font-semibold">
              Change the hour or the mail in your settings
            </Link>
          </p>
        </div>
      )}
    </Stretch>
  );
}
