import type { Metadata } from 'next';
import { pagePerson } from '@/app/_server/context';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { lengthUnit } from '../_components/lengths';
import { countryOptions, timeZoneOptions } from '../_components/places';
import { NewSiteForm } from './_components/new-site-form';

export const metadata: Metadata = { title: 'Open a site' };

export default async function NewSitePage() {
  const { person } = await pagePerson('/new-site');
  return (
    <>
      <PageTitle
        title="Open a site"
        lead="A site is the ground you keep: an allotment, a market garden, a show bench's beds. You will be its owner; others can be asked to join."
      />
      <Stretch>
        <NewSiteForm
          unit={lengthUnit(person.units)}
          countries={countryOptions()}
          country={person.units === 'us' ? 'US' : 'GB'}
          zones={timeZoneOptions(person.timeZone)}
          zone={person.timeZone}
        />
      </Stretch>
    </>
  );
}
