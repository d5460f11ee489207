import { DataTable } from '@/lib/ui/show/data-table';

const ROWS = [
  { bed: 'North', date: '2019-04-10', ph: '6.1', p: '44', k: '150' },
  { bed: 'South', date: '2019-04-11', ph: '6.6', p: '61', k: '188' },
  { bed: 'North', date: '2020-04-12', ph: '6.2', p: '47', k: '<5' },
];

/** Drawn from rows that mean nothing, so that a grower sees at once whether theirs is like it. */
export function SheetShape() {
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <p className="max-w-measure text-clay">
        One line a sample with a column for each value, or one line a value. A heading over each column, a day, and the
        name of the plot. Columns that are none of our business are left alone.
      </p>
      <DataTable
        caption="A sheet with one line a sample"
        hideCaption
        rows={ROWS}
        rowKey={(row) => `${row.bed} ${row.date}`}
        columns={[
          { key: 'bed', head: 'Bed', rowHead: true, cell: (row) => row.bed },
          { key: 'date', head: 'Date', cell: (row) => row.date },
          { key: 'ph', head: 'pH', numeric: true, cell: (row) => row.ph },
          { key: 'p', head: 'P (ppm)', numeric: true, cell: (row) => row.p },
          { key: 'k', head: 'K (ppm)', numeric: true, cell: (row) => row.k },
        ]}
      />
    </div>
  );
}
