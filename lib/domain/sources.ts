/**
 * Where a figure comes from, as it is shown on screen: publisher, title, number and year, never the address of a copy.
 * 'published' was read in the source's own text; 'quoted' only as a third party quotes it; 'weak' has no accountable author;
 * 'computed' is arithmetic on a published rule; 'from-memory' and 'assumption' are defaults that nobody has checked.
 */
export type FigureStatus = 'published' | 'quoted' | 'weak' | 'computed' | 'from-memory' | 'assumption';

export type Source = {
  readonly publisher: string;
  readonly title: string;
  readonly number?: string;
  readonly year?: number;
  readonly status: FigureStatus;
};

const STATUS_WORDS: Readonly<Record<FigureStatus, string>> = {
  published: '',
  quoted: ' (as quoted by others)',
  weak: ' (weak source)',
  computed: ' (computed from it)',
  'from-memory': ' (unchecked)',
  assumption: ' (our assumption)',
};

export function citation(source: Source): string {
  const parts = [source.publisher, source.title, source.number, source.year?.toString()].filter(
    (part): part is string => part !== undefined,
  );
  return `${parts.join(', ')}${STATUS_WORDS[source.status]}`;
}
