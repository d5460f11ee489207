/**
 * The closed list of units a result can carry. The number on the page is never converted here: `key` only settles the
 * spelling. `basis` says what one divides by, because mass, volume and area results are charted only with their like.
 */
type UnitBasis = 'mass' | 'volume' | 'area' | 'charge' | 'share' | 'index' | 'none';

const ROWS = [
  [
    'mg/kg',
    'mg/kg',
    'mass',
    'ppm PPM p.p.m. mg/kg mg/Kg|mg kg-1|mg·kg⁻¹|mg kg⁻¹ ug/g µg/g μg/g|parts per million|mg P/kg|mg N/kg|mg K/kg|mg S/kg|mg B/kg|mg Ca/kg',
  ],
  ['mg/L', 'mg/L', 'volume', 'mg/L mg/l|mg L-1|mg/litre|mg/liter'],
  ['mg/dm3', 'mg/dm³', 'volume', 'mg/dm3 mg/dm³|mg dm-3'],
  ['mg/100g', 'mg/100 g', 'mass', 'mg/100g|mg/100 g'],
  ['mg P2O5/100g', 'mg P2O5/100 g', 'mass', '|mg P2O5/100g|mg P2O5/100 g'],
  ['g/kg', 'g/kg', 'mass', 'g/kg|g kg-1'],
  ['mg/g', 'mg/g', 'mass', 'mg/g'],
  [
    'lb/acre',
    'lb/acre',
    'area',
    'lb/A lb/a lbs/A Lbs/A lb/ac lbs/ac lbs/acre lb/acre pounds/acre pounds/A #/A PPA pp2m Ib/A lb./A lbs./A lbs/Ac|pounds per acre|lb per acre|lbs per acre|lb acre-1',
  ],
  ['kg/ha', 'kg/ha', 'area', 'kg/ha|kg ha-1'],
  ['t/ha', 't/ha', 'area', 't/ha|t ha-1|tonnes/ha'],
  ['ton/acre', 'ton/acre', 'area', 'T/A ton/acre tons/acre ton/A tons/A T/acre|tons per acre|ton per acre'],
  ['cwt/acre', 'cwt/acre', 'area', 'cwt/A cwt/acre'],
  [
    'lb/1000ft2',
    'lb/1,000 sq ft',
    'area',
    'lb/1000ft2 #/1000|lb/1000 ft2|lb/1000 ft²|lb/1000 sq ft|lbs/1000 sq. ft.|lbs/1000 sq ft|lb/1,000 sq ft|lbs/1,000 sq ft|lb/M sq ft|lb per 1,000 sq ft|lbs per 1,000 sq ft|lb per 1000 sq ft|lbs per 1000 sq ft|pounds per 1,000 sq ft|pounds per 1000 sq ft|pounds per 1,000 square feet|lb/1,000 ft2',
  ],
  [
    'lb/100ft2',
    'lb/100 sq ft',
    'area',
    'lb/100ft2|lb/100 sq ft|lbs/100 sq ft|lb per 100 sq ft|lbs per 100 sq ft|pounds per 100 square feet',
  ],
  [
    'oz/1000ft2',
    'oz/1,000 sq ft',
    'area',
    'oz/1000ft2|oz/1,000 sq ft|oz/1000 sq ft|oz per 1,000 sq ft|oz per 1000 sq ft|ounces per 1,000 square feet',
  ],
  ['oz/100ft2', 'oz/100 sq ft', 'area', 'oz/100ft2|oz/100 sq ft|oz per 100 sq ft|ounces per 100 square feet'],
  ['oz/yd2', 'oz/sq yd', 'area', 'oz/yd2|oz/sq yd|oz per sq yd'],
  ['g/m2', 'g/m²', 'area', 'g/m2 g/m²|g per m2'],
  [
    'meq/100g',
    'meq/100 g',
    'charge',
    'meq/100g me/100g mEq/100g MEQ/100G meq/100gm meq% cmol(+)/kg cmol+/kg cmolc/kg cmol/kg meq/lOOg|meq/100 g|me/100 g|mEq/100 g|cmol(+) kg-1|meq per 100 g|meq|milliequivalents per 100 grams|milliequivalents per 100 g|milliequivalents/100 g|meq per 100g|mval/100 g|mval/100g|cmolc kg-1|cmol kg-1|cmol+ kg-1',
  ],
  ['mmolc/kg', 'mmolc/kg', 'charge', 'mmol(+)/kg mmolc/kg mmol+/kg|mmol(+) kg-1|mmolc kg-1|mmol(c)/kg|meq/kg'],
  [
    'meq/100cm3',
    'meq/100 cm³',
    'charge',
    'meq/100cm3 cmolc/dm3 cmol/dm3 cmol(+)/dm3 cmolc/dm³|meq/100 cm³|meq/100 cm3',
  ],
  ['meq/L', 'meq/L', 'charge', 'meq/L mmolc/L me/L meq/l'],
  [
    '%',
    '%',
    'share',
    '% pct pct. percent Percent percentage Percentage|per cent|g/100g|g/100 g|% of CEC|% CEC|%CEC|% by wt|% w/w',
  ],
  ['dS/m', 'dS/m', 'none', 'dS/m ds/m mmhos/cm mmho/cm mmhos millimhos/cm mS/cm'],
  ['mS/m', 'mS/m', 'none', 'mS/m'],
  ['uS/cm', 'µS/cm', 'none', 'uS/cm µS/cm μS/cm umhos/cm'],
  ['g/cm3', 'g/cm³', 'none', 'g/cm3 g/cc g/cm³ g/mL g/ml'],
  ['pH', 'pH', 'index', 'pH SU s.u. S.U.|pH units|pH unit|std units'],
  ['index', 'index', 'index', 'index Index'],
  ['ratio', 'ratio', 'index', 'ratio :1'],
  ['class', 'class', 'index', 'class'],
  ['L/kg', 'L/kg', 'mass', 'L/kg'],
  ['mg CaCO3/kg/pH', 'mg CaCO3/kg per pH', 'mass', '|mg CaCO3/kg/pH|ppm CaCO3/pH'],
] as const;

export type UnitKey = (typeof ROWS)[number][0];

type Unit = {
  readonly key: UnitKey;
  readonly label: string;
  readonly basis: UnitBasis;
  readonly spellings: readonly string[];
};

/** First segment holds blank-separated spellings, the further ones (after |) may hold blanks. */
function spellingsOf(text: string): string[] {
  const [words = '', ...phrases] = text.split('|');
  return [...words.split(' '), ...phrases].filter((spelling) => spelling !== '');
}

export const UNITS: readonly Unit[] = ROWS.map(([key, label, basis, text]) => ({
  key,
  label,
  basis,
  spellings: spellingsOf(text),
}));

const BY_KEY: ReadonlyMap<string, Unit> = new Map(UNITS.map((unit) => [unit.key, unit]));

export function isUnitKey(text: string): text is UnitKey {
  return BY_KEY.has(text);
}

/** The unit of that key, or undefined when the key is not in the closed list. */
export function unitOf(key: string): Unit | undefined {
  return BY_KEY.get(key);
}
