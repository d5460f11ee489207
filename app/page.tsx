import { redirect } from 'next/navigation';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { PublicFrame } from '@/lib/ui/frame/public-frame';
import { Hero } from '@/lib/ui/landing/hero';
import { Round } from '@/lib/ui/landing/round';
import { pageContext } from './_server/context';

const ROUND = [
  {
    title: 'Drop the report',
    said: 'PDF, scan, photograph, CSV or workbook, as the laboratory sent it. It is read, and every number keeps its place on the page.',
  },
  { title: 'Check it against its page', said: 'You confirm the values; nothing becomes history before that.' },
  { title: 'Record what you spread', said: 'Material, amount, day, and the change you mean it to make.' },
  {
    title: 'See whether it came',
    said: 'The next test answers: as intended, short of it, or cannot tell yet and what would settle it.',
  },
];

/** For visitors. Whoever is signed in goes on to what is due today. */
export default async function LandingPage() {
  if ((await pageContext()).actor.kind === 'person') redirect('/today');
  return (
    <PublicFrame
      shape="open"
      links={[
        { href: '/guide', label: 'Guide' },
        { href: '/sign-in', label: 'Sign in' },
      ]}
    >
      <Hero
        title="Did it work?"
        lead="Loamline keeps every soil test of every plot, what you spread in between, and says plainly whether the change you meant is the change that came."
        actions={
          <>
            <LinkButton href="/sign-up">Start with your last report</LinkButton>
            <LinkButton href="/sign-in" look="quiet">
              Sign in
            </LinkButton>
          </>
        }
        note="The numbers drawn here are an invented bed."
      />
      <Round title="The round of a year" steps={ROUND} />
    </PublicFrame>
  );
}
