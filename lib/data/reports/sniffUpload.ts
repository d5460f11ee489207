import { Problem } from '@/lib/errors';
import { maxBytesOf, type ReportKind, sniffReport } from '@/lib/services/reading/sniff';

const megabytes = (bytes: number) => `${Math.round(bytes / 1024 / 1024)} MB`;

/** What the bytes are, agreed with what the name says. Everything else is refused before it is stored: the one place a scanner would stand. */
export function sniffUpload(bytes: Uint8Array, fileName: string): { kind: ReportKind; contentType: string } {
  const sniffed = sniffReport({ bytes, fileName });
  if (!sniffed.ok) {
    const { code, sentence } = sniffed;
    throw new Problem(code === 'empty' ? 'invalid' : 'wrong-type', `${fileName}: ${sentence} Nothing was kept.`, {
      reason: code,
    });
  }
  const largest = maxBytesOf(sniffed.kind);
  if (bytes.byteLength > largest) {
    const sentence = `${fileName} is larger than the ${megabytes(largest)} taken for a file of its kind. Nothing was kept.`;
    throw new Problem('too-large', sentence, { reason: 'too-large' });
  }
  return { kind: sniffed.kind, contentType: sniffed.contentType };
}
