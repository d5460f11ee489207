import type { PageCell } from './cells';
import type { Role } from './roles';

/** A number beside a label that is no result, and the evidence. */
export type NotTaken = { readonly cell: PageCell; readonly role: Role | 'advice' | 'several'; readonly why: string };
