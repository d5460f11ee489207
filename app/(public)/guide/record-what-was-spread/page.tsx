import type { Metadata } from 'next';
import Link from 'next/link';
import { GuidePage, Part, Points, Steps } from '../_components/guide-page';

export const metadata: Metadata = { title: 'Record what was spread' };

export default function SpreadGuide() {
  return (
    <GuidePage
      href="/guide/record-what-was-spread"
      title="Record what was spread"
      lead="A test tells that something changed. Only a record of what you did, and what you meant by it, lets anyone say whether it worked."
    >
      <Part title="The record">
        <Steps>
          <li>Open the plot, then its records, and record an application.</li>
          <li>
            Choose the material. Its analysis, cautions and source stand beside it; one that is missing can be entered
            as your own.
          </li>
          <li>Enter what was really spread: amount, area, day, and how deep it was worked in. Not what was planned.</li>
          <li>
            Say which change you mean it to make: pH down by 0.5, say. For sulfur and lime a range from extension tables
            is offered, with its sources and how good they are; you may put your own.
          </li>
        </Steps>
      </Part>
      <Part title="So that a verdict is possible">
        <Points>
          <li>Have a test from before spreading, at most 24 months old.</li>
          <li>
            Leave one plot, or a strip, untreated and sample it the same day. It tells your work apart from the season.
          </li>
          <li>Sample again in the same season, at the same depth, with the same laboratory, from as many cores.</li>
          <li>
            Wait until it can have acted. A{' '}
            <Link className="text-link" href="/guide/reminders">
              reminder
            </Link>{' '}
            counts the warm months for you.
          </li>
        </Points>
        <p>
          How the verdict is made:{' '}
          <Link className="text-link" href="/guide/method">
            How Loamline decides whether it worked
          </Link>
          .
        </p>
      </Part>
      <Part title="Mistakes">
        <p>
          A record can be corrected or removed, with a reason that stays. The verdict follows; the earlier one is kept
          beside it with its day. Helpers change their own records, owners and advisers any.
        </p>
        <p>Follow the product label, local rules and a licensed adviser where they apply.</p>
      </Part>
    </GuidePage>
  );
}
