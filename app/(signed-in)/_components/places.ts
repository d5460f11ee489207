import type { Option } from '@/lib/ui/fields/select-field';

/** ISO 3166-1 alpha-2 codes that people garden in; the names come from the runtime's own tables, on the server only. */
const COUNTRIES =
  'AR AT AU BE BG BR CA CH CL CN CO CR CY CZ DE DK EC EE EG ES FI FR GB GE GR HR HU IE IL IN IS IT JP KE KR LI LT LU LV MA MT MX MY NG NL NO NZ PE PH PK PL PT RO RS SE SG SI SK TH TN TR TW TZ UA UG US UY VN ZA ZM ZW';

export function countryOptions(): Option[] {
  const names = new Intl.DisplayNames('en', { type: 'region' });
  return COUNTRIES.split(' ')
    .map((value) => ({ value, label: names.of(value) ?? value }))
    .sort((a, b) => a.label.localeCompare(b.label, 'en'));
}

export function timeZoneOptions(current: string): Option[] {
  const zones = new Set([current, 'UTC', ...Intl.supportedValuesOf('timeZone')]);
  return [...zones].sort().map((value) => ({ value, label: value.replaceAll('_', ' ') }));
}
