import type { Source } from '../sources';
import type { Caution, Material } from './types';

/** What a bag usually holds. The label on the grower's own bag always counts before these figures. */
const RB209: Source = {
  publisher: 'Defra (UK)',
  title: 'Fertiliser Manual: Analysis of some fertiliser and liming materials',
  number: 'RB209',
  status: 'published',
};
const OKLAHOMA: Source = {
  publisher: 'Oklahoma State University',
  title: 'Secondary Nutrients (common sources)',
  status: 'published',
};
const CORNELL_7: Source = {
  publisher: 'Cornell University Cooperative Extension',
  title: 'Liming Materials',
  number: 'Agronomy Fact Sheet 7',
  status: 'published',
};
const CORNELL_P: Source = {
  publisher: 'Cornell University, NRCCA study material',
  title: 'Phosphorus sources',
  number: 'CA4 PO 27',
  status: 'published',
};
const NEBRASKA_K: Source = {
  publisher: 'University of Nebraska-Lincoln',
  title: 'Potassium Fertilizers',
  status: 'published',
};
const LSU: Source = {
  publisher: 'LSU AgCenter',
  title: 'Fertilizer Conversion Table for Small Area',
  status: 'published',
};
const NOFA_27: Source = {
  publisher: 'Northeast Organic Farming Association',
  title: 'Typical application rates of micronutrient fertilizers',
  number: 'Table 27',
  status: 'published',
};
const MOFGA: Source = {
  publisher: 'Maine Organic Farmers and Gardeners Association (E. Sideman)',
  title: 'Natural Sources of Plant Nutrients',
  status: 'published',
};

const DUST: Caution = {
  text: 'Dusty: spread on a still day, with gloves, goggles and a mask.',
  source: 'Royal Horticultural Society, Acidifying soil',
};
const SULFUR_CAUTIONS: readonly Caution[] = [
  DUST,
  {
    text: 'On growing plants no more than 5 to 10 lb per 1,000 sq ft at once; divide larger amounts.',
    source: 'University of Florida, as quoted by a gardening column (weak source)',
  },
  {
    text: 'About 400 lb per acre (9.2 lb per 1,000 sq ft) in a year is the most.',
    source: 'Ohio State University Extension, AGF-507, as quoted by others',
  },
  {
    text: 'Where the soil fizzes with vinegar, free lime uses the sulfur up and pH hardly moves.',
    source: 'Royal Horticultural Society, Acidifying soil',
  },
  {
    text: 'It does next to nothing in soil below 55 F (13 C) or in waterlogged soil.',
    source: 'Ohio State University Extension, AGF-507, as quoted by others',
  },
];
const LIME_CAUTIONS: readonly Caution[] = [
  { text: 'Dusty: spread on a still day, with gloves, goggles and a mask.', source: 'good practice' },
  {
    text: 'Dug in: divide 11 to 20 lb per 100 sq ft in two, more in three, six months apart. On turf never above 100 lb per 1,000 sq ft at once.',
    source: 'Penn State, Notes to the soil test report: Home Garden; Home Lawn',
  },
  { text: 'Too much lime holds back boron, iron, manganese and zinc.', source: 'general knowledge (unchecked)' },
];

const PH = ['soil_ph_water', 'soil_ph_salt'] as const;
const LIME_ACTS_ON = [...PH, 'buffer_ph', 'exchangeable_acidity', 'calcium', 'base_saturation', 'sat_ca'] as const;

export const MATERIALS: readonly Material[] = [
  {
    key: 'elemental-sulfur-90',
    name: 'Elemental sulfur, 90 %, prilled',
    kind: 'lowers-ph',
    reaction: 'sulfur',
    affects: [...PH, 'sulfur'],
    analysis: { S: { percent: 90, status: 'published', range: [80, 90] } },
    release: 'Weeks to a season, by soil life, in warm moist soil',
    cautions: SULFUR_CAUTIONS,
    source: RB209,
  },
  {
    key: 'elemental-sulfur-fine',
    name: 'Elemental sulfur, flowers or dusting',
    kind: 'lowers-ph',
    reaction: 'sulfur',
    affects: [...PH, 'sulfur'],
    analysis: { S: { percent: 99, status: 'from-memory' } },
    release: 'The fastest of the sulfurs, by soil life, in warm moist soil',
    cautions: SULFUR_CAUTIONS,
    source: LSU,
  },
  {
    key: 'ground-limestone',
    name: 'Ground limestone (calcitic)',
    kind: 'raises-ph',
    reaction: 'lime',
    affects: LIME_ACTS_ON,
    analysis: {
      Ca: { percent: 36, status: 'published', range: [20, 40] },
      CCE: { percent: 95, status: 'published', range: [89, 98] },
    },
    release: 'What passes a 60 mesh within a year, the rest over two or three',
    cautions: LIME_CAUTIONS,
    source: OKLAHOMA,
  },
  {
    key: 'dolomitic-limestone',
    name: 'Ground limestone, dolomitic',
    kind: 'raises-ph',
    reaction: 'lime',
    affects: [...LIME_ACTS_ON, 'magnesium', 'sat_mg'],
    analysis: {
      Ca: { percent: 21, status: 'from-memory' },
      Mg: { percent: 12, status: 'from-memory' },
      CCE: { percent: 100, status: 'from-memory' },
    },
    release: 'Slower than calcitic limestone of the same fineness',
    cautions: [
      ...LIME_CAUTIONS,
      { text: 'Not where magnesium is already enough or high.', source: 'general knowledge (unchecked)' },
    ],
    source: CORNELL_7,
  },
  {
    key: 'gypsum',
    name: 'Gypsum',
    kind: 'mineral',
    reaction: 'soluble-salt',
    affects: ['calcium', 'sulfur', 'sat_ca'],
    analysis: { Ca: { percent: 23, status: 'published' }, S: { percent: 18.6, status: 'published' } },
    release: 'Dissolves over weeks',
    cautions: [DUST, { text: 'It does not change pH.', source: 'general knowledge (unchecked)' }],
    source: OKLAHOMA,
  },
  {
    key: 'epsom-salt',
    name: 'Epsom salt',
    kind: 'mineral',
    reaction: 'soluble-salt',
    affects: ['magnesium', 'sulfur', 'sat_mg'],
    analysis: { Mg: { percent: 9.65, status: 'published' }, S: { percent: 13, status: 'computed' } },
    release: 'At once',
    cautions: [
      {
        text: '3 lb per 100 sq ft or more: in two parts, four months apart.',
        source: 'Penn State, Notes to the soil test report: Home Garden',
      },
    ],
    source: RB209,
  },
  {
    key: 'potassium-sulfate',
    name: 'Potassium sulfate',
    kind: 'mineral',
    reaction: 'soluble-salt',
    affects: ['potassium', 'sulfur', 'sat_k'],
    analysis: { K2O: { percent: 50, status: 'published' }, S: { percent: 18, status: 'published' } },
    release: 'At once',
    cautions: [{ text: 'A salt: keep it off seed rows.', source: 'general knowledge (unchecked)' }],
    source: NEBRASKA_K,
  },
  {
    key: 'triple-superphosphate',
    name: 'Triple superphosphate',
    kind: 'mineral',
    reaction: 'soluble-salt',
    affects: ['phosphorus', 'calcium'],
    analysis: { P2O5: { percent: 46, status: 'published' }, Ca: { percent: 14, status: 'from-memory' } },
    release: 'At once',
    cautions: [
      {
        text: 'Only where a soil test asks for it: phosphorus washed away feeds algae.',
        source: 'general knowledge (unchecked)',
      },
    ],
    source: CORNELL_P,
  },
  {
    key: 'borax',
    name: 'Borax',
    kind: 'mineral',
    reaction: 'soluble-salt',
    affects: ['boron'],
    analysis: { B: { percent: 10.6, status: 'published', range: [10.6, 11] } },
    release: 'At once; washes out of sand',
    cautions: [
      {
        text: 'A few grams decide. Weigh it, spread it evenly in a carrier or water, and never repeat it without a test: 0.5 to 1 lb of boron per acre for most crops, 2.5 at the very most.',
        source: 'Northeast Organic Farming Association, Table 27',
      },
      {
        text: 'Never in a band: an overlapped pass can poison the crop.',
        source: 'Michigan State University Extension (R. Goldy)',
      },
    ],
    source: NOFA_27,
  },
  {
    key: 'garden-compost',
    name: 'Garden compost',
    kind: 'organic',
    reaction: null,
    affects: ['organic_matter', 'phosphorus', 'potassium'],
    analysis: {
      N: { percent: 1, status: 'published' },
      P2O5: { percent: 1, status: 'published' },
      K2O: { percent: 1, status: 'published' },
    },
    release: 'Slow',
    cautions: [
      {
        text: 'Inches of it every year push phosphorus and potassium too high.',
        source: 'general knowledge (unchecked)',
      },
    ],
    source: MOFGA,
  },
];
