'use client';

import { Plus } from 'lucide-react';
import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { CopyField } from '@/lib/ui/actions/copy-field';
import { LinkButton } from '@/lib/ui/actions/link-button';
import { LinkTabs } from '@/lib/ui/actions/link-tabs';
import { Menu } from '@/lib/ui/actions/menu';
import { Segmented } from '@/lib/ui/actions/segmented';

export function ActionsSection() {
  const [unit, setUnit] = useState<'us' | 'acre' | 'metric'>('us');
  const [picked, setPicked] = useState('nothing yet');
  return (
    <div className="grid gap-7">
      <div className="flex flex-wrap items-center gap-3">
        <Button>Confirm 18 values</Button>
        <Button look="quiet" icon={<Plus aria-hidden className="size-5" />}>
          Add a plot
        </Button>
        <Button look="destructive">Withdraw this report</Button>
        <Button look="plain">Leave it for now</Button>
        <Button size="small" look="quiet">
          Undo
        </Button>
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <Button busy busyLabel="Confirming">
          Confirm 18 values
        </Button>
        <Button unavailable="Two values still have no unit">Confirm 18 values</Button>
        <LinkButton href="#actions">Open the review</LinkButton>
        <LinkButton href="#actions" look="quiet">
          See the numbers
        </LinkButton>
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <Menu
          label="More for this plot"
          items={[
            { key: 'edit', label: 'Change name and area', onSelect: () => setPicked('change') },
            {
              key: 'print',
              label: 'Print the sheet',
              note: 'One page, letter size',
              onSelect: () => setPicked('print'),
            },
            {
              key: 'archive',
              label: 'Archive this plot',
              destructive: true,
              parted: true,
              onSelect: () => setPicked('archive'),
            },
          ]}
        />
        <p className="text-sm text-clay">Picked: {picked}</p>
      </div>
      <Segmented
        label="Unit of amounts"
        value={unit}
        onChange={setUnit}
        options={[
          { value: 'us', label: 'lb per 1,000 sq ft' },
          { value: 'acre', label: 'lb per acre' },
          { value: 'metric', label: 'kg per hectare' },
        ]}
      />
      <LinkTabs
        label="North bed"
        current="#history"
        tabs={[
          { href: '#history', label: 'History' },
          { href: '#compare', label: 'Compare' },
          { href: '#records', label: 'Records' },
        ]}
      />
      <CopyField
        label="Share link"
        hint="Anyone with this link sees the confirmed numbers of this site."
        value="https://loamline.test/s/8Zq4-hT2m"
      />
    </div>
  );
}
