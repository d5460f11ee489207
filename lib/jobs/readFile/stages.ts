import type { Trace } from '@/lib/reading/readPages';
import type { Reading } from '@/lib/reading/types';

type Span = { readonly x0: number; readonly y0: number; readonly x1: number; readonly y1: number };

const at = (span: Span) => [span.x0, span.y0, span.x1, span.y1].map((value) => Math.round(value * 10) / 10);

/** What each stage of the reader gave for one page, in the order of the stages, as plain objects in upright points. */
export function stagesOf(trace: Trace, number: number, reading: Reading) {
  const page = trace.pages.find((one) => one.number === number);
  const lines = trace.lines.filter((line) => line.line.page === page);
  return {
    words: (page?.words ?? []).map((word) => ({ text: word.text, box: at(word), size: word.size })),
    lines: lines.map((line) => ({ text: line.line.text, y: [line.line.y0, line.line.y1] })),
    edges: trace.edges.filter((edge) => edge.page === number),
    cells: lines.flatMap((line) =>
      line.cells.map((cell) => ({ text: cell.phrase.text, box: at(cell.phrase), meaning: cell.meaning.kind })),
    ),
    zones: trace.zones.filter((zone) => zone.page === number && zone.zone !== 'results'),
    identity: trace.identity.filter((hit) => hit.page === number),
    tables: trace.tables
      .filter((table) => table.rows.some((row) => row.line.page === page))
      .map((table) => ({
        headings: table.header.map((line) => line.line.text),
        rows: table.rows.length,
        columns: table.columns.map((column) => ({
          heading: column.heading,
          analyte: column.label?.analyte ?? null,
          unit: column.label?.unit ?? null,
          method: column.label?.method ?? null,
          field: column.field,
          role: column.role,
        })),
      })),
    lists: trace.runs
      .filter((run) => run.segments[0]?.line.line.page === page)
      .map((run) => ({
        names: run.segments.map((segment) => segment.label.text),
        columns: run.columns.map(({ heading, role, unit, identity }) => ({
          heading,
          role,
          unit: unit?.unit ?? null,
          identity,
        })),
      })),
    samples: trace.contexts.filter((context) => context.page === number).map((context) => context.identity),
    statements: {
      unit: trace.statements.unit?.unit ?? null,
      methods: [...trace.statements.methods].map(([key, { printed }]) => [key, printed]),
      units: [...(trace.statements.units ?? [])].map(([key, { unit }]) => [key, unit]),
    },
    notResults: [
      ...trace.notTaken
        .filter((one) => one.cell.phrase.page === page)
        .map((one) => ({ printed: one.cell.phrase.text, is: one.role, because: one.why })),
      ...trace.proseRefused
        .filter((one) => one.line.line.page === page)
        .map((one) => ({ printed: one.text, is: 'sentence', because: one.why })),
    ],
    results: reading.samples.flatMap((sample) =>
      sample.results
        .filter((result) => result.page === number)
        .map((result) => ({
          sample: sample.sampleId ?? sample.labNumber ?? sample.fieldName,
          analyte: result.analyte,
          printed: result.printed,
          unit: result.unit,
          method: result.method,
          confidence: result.confidence,
          doubts: result.doubts.map((doubt) => doubt.code),
        })),
    ),
  };
}
