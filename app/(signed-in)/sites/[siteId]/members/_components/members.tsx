'use client';

import { useRouter } from 'next/navigation';
import { can } from '@/lib/access/table';
import type { Member, MemberList } from '@/lib/schemas/sites';
import { ConfirmButton } from '@/lib/ui/actions/confirm-button';
import { callApi } from '@/lib/ui/api';
import { useAnnounce } from '@/lib/ui/feedback/announce';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { useApi } from '@/lib/ui/use-api';
import { ChangeRole } from './change-role';
import { onDay } from './role-options';

export function Members({ siteId, first }: { siteId: string; first: MemberList }) {
  const path = `/sites/${siteId}/members`;
  const { data = first, problem, reload } = useApi<MemberList>(path, { fallback: first });
  return (
    <div className="grid gap-4">
      <ProblemNotice problem={problem} />
      <ul className="border-y border-horizon-5">
        {data.members.map((member) => (
          <li key={member.id} className="border-b border-horizon-5 py-4 last:border-0">
            <MemberRow
              siteId={siteId}
              member={member}
              manages={can(data.role, 'site.manage')}
              onChanged={() => void reload()}
            />
          </li>
        ))}
      </ul>
    </div>
  );
}

type RowProps = { siteId: string; member: Member; manages: boolean; onChanged: () => void };

function MemberRow({ siteId, member, manages, onChanged }: RowProps) {
  const path = `/sites/${siteId}/members/${member.id}`;
  return (
    <div className="grid gap-3 sm:grid-cols-[1fr_auto] sm:items-center sm:gap-6">
      <div className="min-w-0">
        <p className="font-semibold break-words">
          {member.name}
          {member.isYou ? <span className="font-normal text-clay"> (you)</span> : null}
        </p>
        {member.email ? <p className="text-sm break-all text-clay">{member.email}</p> : null}
        <p className="text-sm text-clay">
          <span className="font-semibold text-humus capitalize">{member.role}</span> since {onDay(member.since)}
        </p>
      </div>
      <div className="flex flex-wrap gap-3">
        {manages ? <ChangeRole path={path} member={member} onChanged={onChanged} /> : null}
        {member.isYou ? <Leave siteId={siteId} /> : null}
        {manages && !member.isYou ? <Remove path={path} member={member} onChanged={onChanged} /> : null}
      </div>
    </div>
  );
}

function Remove({ path, member, onChanged }: { path: string; member: Member; onChanged: () => void }) {
  const announce = useAnnounce();
  return (
    <ConfirmButton
      size="small"
      title={`Remove ${member.name}?`}
      sentence="They see nothing of this site from now on. What they recorded stays, under their name."
      confirmLabel={`Remove ${member.name}`}
      busyLabel="Removing"
      keepLabel="Keep them"
      onConfirm={async () => {
        const result = await callApi(path, { method: 'DELETE' });
        if (result.ok) announce(`${member.name} is off this site.`, { tone: 'saved' });
        if (result.ok) onChanged();
        return result;
      }}
    >
      Remove
    </ConfirmButton>
  );
}

function Leave({ siteId }: { siteId: string }) {
  const router = useRouter();
  return (
    <ConfirmButton
      size="small"
      title="Leave this site?"
      sentence="You see nothing of it from then on, and get no mail about it. What you recorded stays. To come back you need a new invitation."
      confirmLabel="Leave the site"
      busyLabel="Leaving"
      keepLabel="Stay"
      onConfirm={async () => {
        const result = await callApi(`/sites/${siteId}/membership`, { method: 'DELETE' });
        if (result.ok) {
          router.push('/today');
          router.refresh();
        }
        return result;
      }}
    >
      Leave this site
    </ConfirmButton>
  );
}
