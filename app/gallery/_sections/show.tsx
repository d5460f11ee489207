import { DataTable } from '@/lib/ui/show/data-table';
import { DefinitionList } from '@/lib/ui/show/definition-list';
import { Pagination } from '@/lib/ui/show/pagination';
import { Timeline } from '@/lib/ui/show/timeline';

const rows = [
  { analyte: 'pH', last: '5.9', now: '6.3', said: 'more than noise' },
  { analyte: 'Phosphorus', last: '48', now: '51', said: 'within noise' },
  { analyte: 'Boron', last: '< 0.1', now: '0.4', said: 'methods differ, not compared' },
];

const columns = [
  { key: 'analyte', head: 'Analyte', cell: (row: (typeof rows)[number]) => row.analyte, rowHead: true },
  { key: 'last', head: 'Fall 2025', cell: (row: (typeof rows)[number]) => row.last, numeric: true },
  { key: 'now', head: 'Spring 2026', cell: (row: (typeof rows)[number]) => row.now, numeric: true },
  { key: 'said', head: 'Difference', cell: (row: (typeof rows)[number]) => row.said },
];

export function ShowSection() {
  return (
    <div className="grid gap-8">
      <DataTable caption="North bed, fall against spring" columns={columns} rows={rows} rowKey={(row) => row.analyte} />
      <DataTable
        caption="No rows"
        columns={columns}
        rows={[]}
        rowKey={(row) => row.analyte}
        empty="Nothing was measured in both tests."
      />
      <div className="grid gap-10 lg:grid-cols-2">
        <DefinitionList
          items={[
            { term: 'Laboratory', said: 'Hollin Vale Soils' },
            { term: 'Method', said: 'Mehlich-3', note: 'Read from the page, line 3' },
            { term: 'Depth', said: '6 in' },
          ]}
        />
        <Timeline
          label="North bed"
          items={[
            {
              key: 'd',
              day: '2026-10-12',
              dayLabel: '12 October 2026',
              mark: 'due',
              title: 'Sample again',
              children: 'Same season, same depth, same laboratory.',
            },
            { key: 'a', day: '2026-05-03', dayLabel: '3 May 2026', mark: 'sample', title: 'pH 6.3' },
            {
              key: 'b',
              day: '2025-10-20',
              dayLabel: '20 October 2025',
              mark: 'spread',
              title: 'Lime, 40 lb',
              children: 'Worked in 6 in deep.',
            },
            {
              key: 'c',
              day: '2025-10-02',
              dayLabel: '2 October 2025',
              mark: 'note',
              title: 'Ground wet, cores taken late',
            },
          ]}
        />
      </div>
      <Pagination
        label="Reports"
        summary="21 to 40 of 64 reports"
        previous={{ href: '#show', label: 'Newer reports' }}
        next={{ href: '#show', label: 'Older reports' }}
      />
    </div>
  );
}
