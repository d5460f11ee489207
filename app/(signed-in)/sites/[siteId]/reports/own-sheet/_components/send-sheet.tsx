'use client';

import { Sheet } from 'lucide-react';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { UploadAnswer } from '@/lib/schemas/reports';
import { Button } from '@/lib/ui/actions/button';
import { LinkButton } from '@/lib/ui/actions/link-button';
import type { Problem } from '@/lib/ui/api';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { FileButton } from '@/lib/ui/files/file-button';
import { uploadApi } from '@/lib/ui/upload';

const ENDINGS = '.xlsx,.xls,.csv,.tsv,.txt';

/** One spreadsheet, sent as what it is: results typed up by the grower and no laboratory's report. */
export function SendSheet({ siteId }: { siteId: string }) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const [seen, setSeen] = useState<{ file: File; reportId: string } | null>(null);
  const home = `/sites/${siteId}/reports`;

  const send = async (file: File | undefined, asRevision = false) => {
    if (file === undefined || busy) return;
    setBusy(true);
    setProblem(undefined);
    setSeen(null);
    const body = new FormData();
    body.set('file', file);
    body.set('ownSheet', 'true');
    if (asRevision) body.set('asRevision', 'true');
    const result = await uploadApi<UploadAnswer>(`/sites/${siteId}/uploads`, { body });
    if (!result.ok) {
      setProblem(result.problem);
      setBusy(false);
      return;
    }
    if (result.data.kind === 'seen-before') {
      setSeen({ file, reportId: result.data.reportId });
      setBusy(false);
      return;
    }
    router.push(`${home}/${result.data.reportId}`);
  };

  return (
    <div className="grid justify-items-start gap-4">
      <FileButton
        accept={ENDINGS}
        busy={busy}
        busyLabel="Sending"
        icon={<Sheet aria-hidden="true" className="size-5" />}
        onFiles={(files) => void send(files[0])}
      >
        Choose the spreadsheet
      </FileButton>
      <p className="max-w-measure text-sm text-clay">
        XLSX, XLS or CSV, up to 5 MB and 5,000 rows. Nothing counts before you have seen what comes of it.
      </p>
      <ProblemNotice problem={problem} />
      {seen ? (
        <Notice
          tone="look"
          live
          title="This file was sent before"
          action={
            <>
              <LinkButton look="quiet" size="small" className="min-h-(--target)!" href={`${home}/${seen.reportId}`}>
                Open it
              </LinkButton>
              <Button
                look="quiet"
                size="small"
                className="min-h-(--target)!"
                onClick={() => void send(seen.file, true)}
              >
                Send it again as a spreadsheet of your own
              </Button>
            </>
          }
        >
          It is kept once. If it was sent as a laboratory’s report by mistake, it can be sent again as your own sheet.
        </Notice>
      ) : null}
    </div>
  );
}
