import { citation, type Source } from '@/lib/domain/sources';

type Cited = Source & { says: string };

export const METHOD_SOURCES: readonly Cited[] = [
  {
    publisher: 'Ferrari and Vermeulen',
    title: 'Soil heterogeneity and soil testing, Netherlands Journal of Agricultural Science',
    status: 'published',
    says: 'Analysis and sampling together: 10 % for phosphorus, potassium and magnesium, 0.1 for pH.',
  },
  {
    publisher: 'Soil Science (journal)',
    title: 'The variability in soil characterization data from laboratories in the northeastern United States',
    status: 'published',
    says: 'Fourteen soils in seven laboratories: about 0.2 pH between laboratories.',
  },
  {
    publisher: 'Miller and Czyryca',
    title: 'Soil Analysis: ALP Program Inter and Intra Laboratory Method Performance, ASA-CSSA-SSSA meeting',
    number: '359-2',
    year: 2015,
    status: 'published',
    says: 'Between laboratories: 15 to 20 % for organic matter of 1 to 5 %.',
  },
  {
    publisher: 'Raun and others',
    title: 'Soil Science Society of America Journal',
    number: '62:683-690',
    year: 1998,
    status: 'published',
    says: 'pH of 490 squares of one foot: how much neighbouring cores differ.',
  },
  {
    publisher: 'Gascho and others',
    title: 'Communications in Soil Science and Plant Analysis',
    number: '27:773-782',
    year: 1996,
    status: 'published',
    says: 'How readings move with the season.',
  },
  {
    publisher: 'Barnett, van der Pols and Dobson',
    title: 'International Journal of Epidemiology',
    number: '34:215-220',
    year: 2005,
    status: 'published',
    says: 'Regression to the mean, and how to allow for it.',
  },
];

export const TRIAL: Cited = {
  publisher: 'Glendining, Holland, McGrath and Goulding',
  title:
    'Rothamsted long-term liming experiment soil chemical properties 1962-1996, Electronic Rothamsted Archive, doi:10.23637/rcs10-soil-01',
  year: 2023,
  status: 'published',
  says: 'Open data under the Creative Commons Attribution 4.0 licence (CC BY 4.0); averaged by us per plot and sampling.',
};

export function SourceList({ sources }: { sources: readonly Cited[] }) {
  return (
    <ul className="grid max-w-measure gap-2.5 border-l-4 border-horizon-5 pl-4 text-sm">
      {sources.map((source) => (
        <li key={source.title}>
          {source.says} <cite className="text-clay not-italic">{citation(source)}.</cite>
        </li>
      ))}
    </ul>
  );
}
