'use client';

import { Button } from '@/lib/ui/actions/button';
import { localProblem } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { Notice } from '@/lib/ui/feedback/notice';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { StatusWord } from '@/lib/ui/feedback/status-word';

export function MessagesSection() {
  const announce = useAnnounce();
  return (
    <div className="grid gap-4">
      <div className="grid gap-4 lg:grid-cols-2">
        <Notice>This site was made with example plots. You can remove them in the settings.</Notice>
        <Notice tone="look" title="Two values look odd" action={<Button look="quiet">Go to the first</Button>}>
          Potassium says 1,820 ppm; last spring it said 182. The page is shown beside it.
        </Notice>
        <Notice tone="error" title="This file could not be read">
          The PDF is locked with a password. The file is kept. Save a copy without the password and send that.
        </Notice>
        <Notice tone="saved">18 values are now results of three plots.</Notice>
        <ProblemNotice problem={localProblem('timed-out', 'POST')} />
        <ProblemNotice problem={{ ...localProblem('unreachable', 'GET'), reference: '7f3a-02' }} />
      </div>
      <div className="flex flex-wrap gap-x-7 gap-y-2">
        <StatusWord status="waiting">waiting</StatusWord>
        <StatusWord status="working">being read</StatusWord>
        <StatusWord status="needs-you">waits for your eyes</StatusWord>
        <StatusWord status="done">confirmed</StatusWord>
        <StatusWord status="failed">could not be read</StatusWord>
        <StatusWord status="off">set aside</StatusWord>
      </div>
      <div className="flex flex-wrap gap-3">
        <Button look="quiet" onClick={() => announce('18 values confirmed for North bed.', { tone: 'saved' })}>
          Say that it is saved
        </Button>
        <Button
          look="quiet"
          onClick={() =>
            announce('The value was not saved: no connection. It is still in the field.', { tone: 'error' })
          }
        >
          Say that it is not
        </Button>
      </div>
    </div>
  );
}
