import { NOISE_CLASSES, type NoiseClass, type NoiseClassKey } from '@/lib/domain/effects/noise-defaults';
import { DataTable } from '@/lib/ui/show/data-table';
import { statusOf } from './status-of';

const LABELS: Record<NoiseClassKey, string> = {
  'ph-water': 'pH in water',
  'ph-salt': 'pH in salt solution, buffer pH',
  p: 'Phosphorus',
  k: 'Potassium, sodium',
  bases: 'Calcium, magnesium, exchange capacity',
  'organic-matter': 'Organic matter',
  micronutrient: 'Zinc, copper, manganese, iron, boron',
  mobile: 'Nitrate, sulfur',
};

type Row = NoiseClass & { key: NoiseClassKey };

const ROWS: readonly Row[] = (Object.keys(LABELS) as NoiseClassKey[]).map((key) => ({ key, ...NOISE_CLASSES[key] }));

function shown(row: Row, value: number | 'refuse'): string {
  if (value === 'refuse') return 'not compared';
  return row.scale === 'additive' ? value.toFixed(2) : `${Math.round(value * 100)} %`;
}

const SIZES = ['core', 'rep', 'wobble', 'occasion', 'season', 'laboratory'] as const;
type Size = (typeof SIZES)[number];

const HEADS: Record<Size, string> = {
  core: 'Core to core',
  rep: 'Laboratory, same bag',
  wobble: 'Plot, short-lived',
  occasion: 'Whole site that day',
  season: 'Another season',
  laboratory: 'Another laboratory',
};

/** The figures the check itself uses, each with its status, so that this page cannot say another. */
export function NoiseTable() {
  return (
    <DataTable
      caption="Default noise of a reading"
      rows={ROWS}
      rowKey={(row) => row.key}
      columns={[
        { key: 'label', head: 'Analyte', rowHead: true, cell: (row) => LABELS[row.key] },
        ...SIZES.map((size) => ({
          key: size,
          head: HEADS[size],
          numeric: true,
          cell: (row: Row) => (
            <>
              {shown(row, row[size])}
              <span className="block font-text text-xs text-clay">{statusOf(row.basis, size)}</span>
            </>
          ),
        })),
      ]}
    />
  );
}
