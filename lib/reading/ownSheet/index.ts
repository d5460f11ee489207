/**
 * A grower's own spreadsheet of old results: `proposeMapping` says what its columns seem to hold, a person corrects that,
 * `applyMapping` makes a reading of it. Pure; sheets become rows elsewhere.
 */
export { applyMapping, TYPED_BY_GROWER } from './apply';
export { proposeMapping } from './propose';
export type {
  AppliedMapping,
  OwnColumn,
  OwnMapping,
  OwnRows,
} from './types';
