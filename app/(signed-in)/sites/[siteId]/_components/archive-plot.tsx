'use client';

import { useRouter } from 'next/navigation';
import type { Plot } from '@/lib/schemas/plots';
import { Button } from '@/lib/ui/actions/button';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useSubmit } from '@/lib/ui/use-submit';

type PlotProps = { readonly siteId: string; readonly plot: Plot };

export function ArchivePlot({ siteId, plot }: PlotProps) {
  const router = useRouter();
  const announce = useAnnounce();
  return (
    <ConfirmButton
      look="quiet"
      title={`Archive ${plot.name}?`}
      sentence="It leaves the plan and the lists. Its tests, its history and its notes stay, and it can be brought back."
      confirmLabel="Archive the plot"
      busyLabel="Archiving"
      keepLabel="Keep it"
      onConfirm={async () => {
        const body = { version: plot.version };
        const result = await callApi(`/sites/${siteId}/plots/${plot.id}/archive`, { method: 'POST', body });
        if (!result.ok) return result;
        announce(`${plot.name} is archived.`, { tone: 'saved' });
        router.push(`/sites/${siteId}`);
        router.refresh();
        return result;
      }}
    >
      Archive this plot
    </ConfirmButton>
  );
}

export function ArchivedNotice({ siteId, plot }: PlotProps) {
  const router = useRouter();
  return (
    <Notice
      title="This plot is archived"
      action={<RestorePlot siteId={siteId} plot={plot} onRestored={router.refresh} />}
    >
      It is on no plan and in no list; everything about it is kept. Bring it back to edit it.
    </Notice>
  );
}

export function RestorePlot({ siteId, plot, onRestored }: PlotProps & { readonly onRestored: () => void }) {
  const { send, busy, problem } = useSubmit<Plot>();
  const announce = useAnnounce();
  const restore = async () => {
    const result = await send(`/sites/${siteId}/plots/${plot.id}/restore`, { body: { version: plot.version } });
    if (!result.ok) return;
    announce(`${plot.name} is back.`, { tone: 'saved' });
    onRestored();
  };
  return (
    <>
      <Button look="quiet" busy={busy} busyLabel="Bringing it back" onClick={() => void restore()}>
        Bring back<span className="sr-only"> {plot.name}</span>
      </Button>
      <ProblemNotice problem={problem} />
    </>
  );
}
