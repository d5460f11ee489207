import type { Role } from '@/lib/access/table';
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
};
