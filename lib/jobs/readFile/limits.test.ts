import { expect, it } from 'vitest';
import { JOBS } from '../names';
import {
  LONGEST_TIME_MS,
  MAX_PAGES,
  MAX_SCANNED_PAGES,
  MEMORY_LIMIT_BYTES,
  SCAN_TIME_MS,
  TIME_LIMIT_MS,
} from './limits';

it('the limits are those that growers are told, and a reading ends before its job runs out', () => {
  expect([MAX_PAGES, MAX_SCANNED_PAGES, TIME_LIMIT_MS, SCAN_TIME_MS]).toEqual([60, 12, 20_000, 10_000]);
  expect(MEMORY_LIMIT_BYTES).toBe(512 * 1024 * 1024);
  expect(JOBS['read-report'].expireInSeconds).toBe(150);
  expect(LONGEST_TIME_MS).toBeLessThan(150_000 - 10_000);
});
