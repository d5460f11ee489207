'use client';

import type { ReactNode } from 'react';
import type { Role } from '@/lib/access/table';
import type { OwnSheet } from '@/lib/schemas/ownSheets';
import { ProblemNotice } from '@/lib/ui/feedback/problem-notice';
import { Skeleton } from '@/lib/ui/feedback/skeleton';
import { useApi } from '@/lib/ui/use-api';
import { OwnSheetScreen } from './own-sheet-screen';

type LoadProps = {
  path: string;
  role: Role;
  /** Of the report: what was fetched before it moved on is asked for again. */
  version: number;
  onImported: () => Promise<void>;
  otherwise: ReactNode;
};

/** The sheet of a report; one that was taken to be typed in by hand has none and is reviewed like any other. */
export function LoadOwnSheet({ path, role, version, onImported, otherwise }: LoadProps) {
  const { data, problem } = useApi<OwnSheet>(`${path}/sheet`);
  if (data && data.report.version >= version) {
    return <OwnSheetScreen key={version} path={path} role={role} first={data} onImported={onImported} />;
  }
  if (problem?.status === 404) return otherwise;
  return (
    <div className="page-wrap py-6">
      {problem ? <ProblemNotice problem={problem} /> : <Skeleton label="Fetching the columns" shape="table" rows={6} />}
    </div>
  );
}
