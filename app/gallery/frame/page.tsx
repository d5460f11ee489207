import { notFound } from 'next/navigation';
import { env } from '@/lib/env';
import { Button } from '@/lib/ui/actions/button';
import { LinkTabs } from '@/lib/ui/actions/link-tabs';
import { Menu } from '@/lib/ui/actions/menu';
import { EmptyState } from '@/lib/ui/feedback/empty-state';
import { Frame } from '@/lib/ui/frame/frame';
import { Layer, Layers } from '@/lib/ui/frame/layers';
import { NavIcon } from '@/lib/ui/frame/nav-icon';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { SiteSwitcher } from '@/lib/ui/frame/site-switcher';
import { DefinitionList } from '@/lib/ui/show/definition-list';

export const dynamic = 'force-dynamic';

export default function FrameGalleryPage() {
  if (!env().gallery) notFound();
  return (
    <Frame
      nav={[
        { href: '/', label: 'Today', icon: 'today' },
        { href: '/sites', label: 'Sites', icon: 'sites', exact: true },
      ]}
      siteNav={[
        { href: '/gallery/frame', label: 'Ground', icon: 'ground' },
        { href: '/gallery/frame/reports', label: 'Reports', icon: 'reports', waiting: 2 },
        { href: '/gallery/frame/effects', label: 'Effects', icon: 'effects' },
        { href: '/gallery/frame/reminders', label: 'Reminders', icon: 'reminders' },
        { href: '/gallery/frame/people', label: 'People', icon: 'people' },
        { href: '/gallery/frame/settings', label: 'Settings', icon: 'settings' },
      ]}
      siteSwitcher={
        <SiteSwitcher
          allHref="/sites"
          currentId="b"
          sites={[
            { id: 'a', name: 'Hollow Lane', href: '#a', note: 'You own it' },
            { id: 'b', name: 'Thornbeck Society', href: '#b', note: 'You advise' },
          ]}
        />
      }
      account={
        <Menu
          look="bare"
          align="end"
          name="Your account"
          label={<NavIcon name="account" className="size-6" />}
          items={[
            { key: 'account', label: 'Your settings', href: '#account' },
            { key: 'out', label: 'Sign out', href: '#out', parted: true },
          ]}
        />
      }
      footerLinks={[
        { href: '/guide', label: 'Guide' },
        { href: '/guide/method', label: 'How verdicts are made' },
      ]}
    >
      <Layers>
        <Layer depth="verdict">
          <PageTitle
            inLayer
            title="North bed"
            above={{ href: '#ground', label: 'Thornbeck Society' }}
            actions={<Button>Record what you spread</Button>}
          />
          <p className="mt-4 max-w-measure text-lg">
            pH rose 0.4, from 5.9 to 6.3. The lab's own spread is about 0.2, so this is likely real.
          </p>
        </Layer>
        <Layer depth="chart" title="pH since 2023">
          <LinkTabs
            label="Analyte"
            current="#ph"
            tabs={[
              { href: '#ph', label: 'pH' },
              { href: '#p', label: 'Phosphorus' },
              { href: '#k', label: 'Potassium' },
            ]}
          />
          <EmptyState shape="chart" title="One test so far">
            With a second one this becomes a line.
          </EmptyState>
        </Layer>
        <Layer depth="numbers" title="What is behind it">
          <DefinitionList
            items={[
              { term: 'Before', said: '5.9', note: '2 May 2025, Hollin Vale Soils' },
              { term: 'After', said: '6.3', note: '3 May 2026, Hollin Vale Soils' },
            ]}
          />
        </Layer>
        <Layer depth="page" title="The printed page" folded>
          <EmptyState shape="page" title="Page 1 of 2" />
        </Layer>
      </Layers>
    </Frame>
  );
}
