'use client';

import type { Plot } from '@/lib/schemas/plots';
import { Button } from '@/lib/ui/actions/button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Dialog } from '@/lib/ui/feedback/dialog';
import { Form } from '@/lib/ui/fields/form';
import { TextField } from '@/lib/ui/fields/text-field';
import { areaOf } from '@/lib/ui/site-plan/geometry';
import { areaText } from '@/lib/ui/site-plan/measure';
import type { LengthUnit, PlanOutline } from '@/lib/ui/site-plan/types';
import { useSubmit } from '@/lib/ui/use-submit';

type NamePlotProps = {
  readonly siteId: string;
  readonly unit: LengthUnit;
  readonly year: number;
  /** The outline just drawn; null: nothing to name. */
  readonly outline: PlanOutline | null;
  readonly onClose: () => void;
  readonly onMade: (plot: Plot) => void;
};

/** A drawn outline becomes a plot once it has a name; the rest can follow. */
export function NamePlot({ siteId, unit, year, outline, onClose, onMade }: NamePlotProps) {
  const { send, busy, problem, clear } = useSubmit<Plot>();
  const announce = useAnnounce();
  const make = async (name: string, crop: string) => {
    const result = await send(`/sites/${siteId}/plots`, { body: { name, outline } });
    if (!result.ok) return;
    const plot = result.data;
    const path = `/sites/${siteId}/plots/${plot.id}/plantings/${year}`;
    const planted = crop === '' ? null : await callApi<Plot>(path, { method: 'PUT', body: { crop } });
    if (planted && !planted.ok) {
      announce(`${plot.name} is saved, but not its crop. ${planted.problem.detail}`, { tone: 'error' });
    } else announce(`${plot.name} is on the plan.`, { tone: 'saved' });
    onMade(planted?.ok ? planted.data : plot);
  };
  const leave = () => {
    if (busy) return;
    clear();
    onClose();
  };
  return (
    <Dialog
      open={outline !== null}
      onOpenChange={(open) => {
        if (!open) leave();
      }}
      title="Name this plot"
      description={outline ? `${areaText(areaOf(outline), unit)} on the plan.` : undefined}
    >
      <Form problem={problem} onSubmit={(values) => void make((values.name ?? '').trim(), (values.crop ?? '').trim())}>
        <TextField
          name="name"
          label="Name"
          hint="As it stands on your sample bags, so that a report finds its plot."
          autoComplete="off"
        />
        <TextField name="crop" label={`Crop of ${year}`} optional autoComplete="off" />
        <div className="flex flex-wrap gap-3">
          <Button type="submit" busy={busy} busyLabel="Saving">
            Keep the plot
          </Button>
          <Button look="quiet" onClick={leave}>
            Throw the outline away
          </Button>
        </div>
      </Form>
    </Dialog>
  );
}
