import type { Metadata } from 'next';
import { orNotFound, pagePerson } from '@/app/_server/context';
import { countryOptions, timeZoneOptions } from '@/app/(signed-in)/_components/places';
import { can } from '@/lib/access/table';
import { listFailedJobs } from '@/lib/data/failedJobs/listFailedJobs';
import { getSite } from '@/lib/data/sites/getSite';
import { listAudit } from '@/lib/data/sites/listAudit';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { lengthUnit } from '../../../_components/lengths';
import { AuditTrail } from './_components/audit-trail';
import { FailedJobs } from './_components/failed-jobs';
import { SiteFacts } from './_components/site-facts';
import { SiteForm } from './_components/site-form';

export const metadata: Metadata = { title: 'Settings' };

export default async function SettingsPage({ params }: { params: Promise<{ siteId: string }> }) {
  const { siteId } = await params;
  const { ctx, person } = await pagePerson(`/sites/${siteId}/settings`);
  const site = await orNotFound(getSite({ ctx, input: { siteId } }));
  const countries = countryOptions();
  const unit = lengthUnit(person.units);
  if (!can(site.role, 'site.manage')) {
    return (
      <>
        <PageTitle title="Settings" lead="An owner of the site can change these." />
        <Stretch>
          <SiteFacts site={site} unit={unit} country={countries.find((one) => one.value === site.country)?.label} />
        </Stretch>
      </>
    );
  }
  const failed = await listFailedJobs({ ctx, input: { siteId } });
  const trail = await listAudit({ ctx, input: { siteId } });
  return (
    <>
      <PageTitle
        title="Settings"
        lead="For everybody on this site. Your own units and mail hour are in your settings."
      />
      <Stretch>
        <SiteForm site={site} unit={unit} countries={countries} zones={timeZoneOptions(site.timeZone)} />
      </Stretch>
      <Stretch title="What was given up" id="given-up">
        <FailedJobs siteId={siteId} first={failed} timeZone={site.timeZone} />
      </Stretch>
      <Stretch title="What was done here" ground="white">
        <AuditTrail siteId={siteId} first={trail} timeZone={site.timeZone} />
      </Stretch>
    </>
  );
}
