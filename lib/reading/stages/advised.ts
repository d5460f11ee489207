import type { Column } from './columns';

const NEVER_ADVISED = new Set([
  'soil_ph_water',
  'soil_ph_salt',
  'buffer_ph',
  'organic_matter',
  'cec',
  'base_saturation',
  'ec',
  'sat_ca',
  'sat_mg',
  'sat_k',
  'clay',
]);

function isOxide(column: Column): boolean {
  const unit = column.label?.unit ?? null;
  const spread = unit === null || /^(lb|kg\/ha|ton|t\/ha|cwt|oz|g\/m2)/.test(unit);
  return spread && (column.label?.form === 'P2O5' || column.label?.form === 'K2O');
}

function isLime(column: Column): boolean {
  return column.label?.analyte === 'lime_requirement' && !/requirement|index|\blr\b/i.test(column.heading);
}

/**
 * Columns of what to spread: "Crop | N | P2O5 | K2O | Lime" with nothing that only a soil has, or P2O5 and K2O to
 * apply beside the P and K that were found.
 */
export function withAdvice(columns: readonly Column[]): Column[] {
  const oxides = columns.filter(isOxide);
  const heading = (pattern: RegExp) => columns.some((column) => pattern.test(column.heading));
  const soil = columns.some((column) => column.label !== null && NEVER_ADVISED.has(column.label.analyte));
  const frame = heading(/^(N|nitrogen)\b/i) || heading(/\blime/i) || heading(/\bcrop/i);
  const all = oxides.length > 0 && !soil && frame;
  const found = columns.some(
    (column) => column.label?.form === 'element' && /^(phosphorus|potassium)$/.test(column.label.analyte),
  );
  const some = oxides.length > 0 && soil && found && (oxides.length >= 2 || frame);
  return columns.map((column) => {
    const nitrogen = column.label === null && column.field === null && /^(N|nitrogen)\b/i.test(column.heading);
    const advised = all
      ? column.label !== null || nitrogen
      : some
        ? isOxide(column) || isLime(column) || nitrogen
        : isLime(column) && oxides.length > 0;
    return advised || isLime(column) ? { ...column, role: 'recommendation' as const } : column;
  });
}
