import { ANALYTE_KEYS, analyte, isAnalyteKey, isMethodKey, methodLabel, unitOf } from '@/lib/domain/analytes';
import type { Report } from '@/lib/schemas/reports';
import type { Result } from '@/lib/schemas/results';
import { StatusWord } from '@/lib/ui/feedback/status-word';
import { Stretch } from '@/lib/ui/frame/layers';
import { PageTitle } from '@/lib/ui/frame/page-title';
import { DataTable } from '@/lib/ui/show/data-table';
import { onDay, reportTitle, STATE_WORDS } from './report-words';

type ReadProps = { siteId: string; report: Report; results: readonly Result[]; plotNames: ReadonlyMap<string, string> };

/** For those who read only: the confirmed values. The original file carries a name and an address and stays closed. */
export function ReadResults({ siteId, report, results, plotNames }: ReadProps) {
  const { status, word } = STATE_WORDS[report.state];
  const samples = [...new Set(results.map((one) => `${one.sampleId} ${one.analysis}`))];
  return (
    <>
      <PageTitle
        title={<span className="break-words">{reportTitle(report)}</span>}
        above={{ href: `/sites/${siteId}/reports`, label: 'Reports' }}
        lead={
          <>
            <StatusWord status={status} className="mr-3">
              {word}
            </StatusWord>
            {report.laboratory ? `${report.laboratory.name}, ` : ''}sent in {onDay(report.uploadedAt)}
          </>
        }
      />
      <Stretch>
        {report.state === 'confirmed' ? (
          <div className="grid gap-8">
            {samples.map((key) => {
              const rows = results
                .filter((one) => `${one.sampleId} ${one.analysis}` === key)
                .sort((a, b) => placeOf(a) - placeOf(b));
              const [first] = rows;
              if (!first) return null;
              const where = plotNames.get(first.plotId) ?? 'A plot that is archived';
              return (
                <DataTable
                  key={key}
                  caption={`${where}, taken ${onDay(first.takenOn)}${first.composite > 1 ? `, bag ${first.composite}` : ''}`}
                  columns={[
                    { key: 'analyte', head: 'Analyte', rowHead: true, cell: (row) => labelOf(row.analyte) },
                    { key: 'value', head: 'Value', numeric: true, cell: (row) => row.printed },
                    {
                      key: 'unit',
                      head: 'Unit',
                      cell: (row) => (row.unit ? (unitOf(row.unit)?.label ?? row.unit) : 'not given'),
                    },
                    {
                      key: 'method',
                      head: 'Method',
                      cell: (row) => (row.method && isMethodKey(row.method) ? methodLabel(row.method) : 'not given'),
                    },
                  ]}
                  rows={rows}
                  rowKey={(row) => row.id}
                />
              );
            })}
            {results.length === 0 ? <p>This report adds no results of its own.</p> : null}
          </div>
        ) : (
          <p className="max-w-measure">
            Its values are shown here once they are confirmed. Until then they are only what was read, and nobody has
            vouched for them.
          </p>
        )}
      </Stretch>
    </>
  );
}

const labelOf = (key: string) => (isAnalyteKey(key) ? analyte(key).label : key);

/** The fixed order in which every list shows the analytes. */
const ORDER: readonly string[] = ANALYTE_KEYS;
const placeOf = (row: Result) => ORDER.indexOf(row.analyte);
