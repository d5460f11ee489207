import type { Metadata } from 'next';
import { DefinitionList } from '@/lib/ui/show/definition-list';
import { GuidePage, Part, Points } from '../_components/guide-page';

export const metadata: Metadata = { title: 'Reminders' };

export default function RemindersGuide() {
  return (
    <GuidePage
      href="/guide/reminders"
      title="Reminders"
      lead="A comparison is lost when the second sample is forgotten, or taken in another season. Loamline watches the day for you."
    >
      <Part title="Three rules for each plot">
        <DefinitionList
          items={[
            {
              term: 'After sulfur',
              said: 'The first day half of it can have acted',
              note: 'Three warm months of your site, counted from the day you recorded it.',
            },
            {
              term: 'After lime',
              said: 'The first day half of it can have acted',
              note: 'A little over four warm months.',
            },
            {
              term: 'Yearly, same season',
              said: 'Twelve months after the last sample',
              note: 'Autumn readings of pH lie below spring ones by themselves, so the same season is compared.',
            },
          ]}
        />
        <p>
          A warm month has soil at or above 13 °C (55 °F). Which months those are stands in the settings of the site;
          the number of months is our assumption. Owners and advisers switch rules on and off under Reminders.
        </p>
      </Part>
      <Part title="The mail">
        <Points>
          <li>
            Two weeks before the day, on the day, and two weeks after, from the hour you chose, in your time zone.
          </li>
          <li>At most one a day, with all your plots and sites in it, and an entry for your calendar.</li>
          <li>
            “Already sampled” ends it for everybody on the site. “Ask again in two weeks” puts it off for you alone.
            Both work from the mail without signing in.
          </li>
          <li>One press stops all reminder mail for you; your settings switch it on again.</li>
          <li>Viewers see what is due and get no mail.</li>
        </Points>
      </Part>
      <Part title="Sources">
        <Points>
          <li>Same season, and autumn pH 0.1 to 0.3 below spring: Virginia Cooperative Extension.</li>
          <li>Sampling 60 to 90 days after sulfur: eXtension, pages on blueberries.</li>
        </Points>
      </Part>
    </GuidePage>
  );
}
