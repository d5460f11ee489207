import type { OwnRows } from '@/lib/reading/ownSheet';
import type { Reading, Remark } from '@/lib/reading/types';

/** Kinds of file that have no pages. */
const DATA_KINDS = ['csv', 'text', 'xlsx', 'xls', 'xml', 'json'] as const;
export type DataKind = (typeof DATA_KINDS)[number];

export function isDataKind(kind: string): kind is DataKind {
  return DATA_KINDS.some((one) => one === kind);
}

export type ToChild = {
  readonly kind: 'pdf' | 'picture' | DataKind;
  readonly fileName: string;
  readonly bytes: Uint8Array;
  /** Only the cells, of a grower's own sheet, unread. */
  readonly rowsOnly?: boolean;
};

/** The cells of a sheet as text, or why there are none. */
export type SheetRows =
  | { readonly ok: true; readonly sheets: readonly OwnRows[]; readonly remarks: readonly Remark[] }
  | { readonly ok: false; readonly error: Remark };

export type FromChild =
  | { readonly type: 'ready' }
  | { readonly type: 'page'; readonly page: number; readonly of: number }
  /** So many pages are pictures and take longer. */
  | { readonly type: 'scans'; readonly pages: number }
  | { readonly type: 'rows'; readonly rows: SheetRows }
  | { readonly type: 'done'; readonly reading: Reading };

/** The child is our own program; the check guards against a half-written message of a dying process. */
export function isFromChild(message: unknown): message is FromChild {
  if (typeof message !== 'object' || message === null || !('type' in message)) return false;
  if (message.type === 'ready') return true;
  if (message.type === 'scans') return 'pages' in message && typeof message.pages === 'number';
  if (message.type === 'rows') return 'rows' in message && typeof message.rows === 'object' && message.rows !== null;
  if (message.type === 'page') return 'page' in message && 'of' in message;
  return (
    message.type === 'done' && 'reading' in message && typeof message.reading === 'object' && message.reading !== null
  );
}
