import type { Role } from '@/lib/access/table';
import type { BatchPlace } from '@/lib/schemas/batches';
import type { Report } from '@/lib/schemas/reports';
import type { Review } from '@/lib/schemas/review';

export type ReportScreenProps = {
  siteId: string;
  role: Role;
  personId: string;
  units: 'us' | 'metric';
  today: string;
  firstReport: Report;
  firstReview: Review | null;
  /** Where it stands among files sent at once. */
  place?: BatchPlace | null;
};
