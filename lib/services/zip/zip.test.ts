import { CFB } from '@e965/xlsx';
import { expect, it } from 'vitest';
import { crc32 } from './crc32';
import { zip } from './zip';

it('has the check value that the catalogue of CRC algorithms gives for CRC-32/ISO-HDLC', () => {
  // "123456789" -> 0xcbf43926: Greg Cook, Catalogue of parametrised CRC algorithms.
  expect(crc32(Buffer.from('123456789'))).toBe(0xcbf43926);
});

it('is opened by another reader of archives, which finds every file whole', () => {
  const picture = Uint8Array.from({ length: 3000 }, (_, at) => at % 251);
  const made = zip([
    { name: 'stages.json', bytes: Buffer.from('{"ph":6.8}') },
    { name: 'page.png', bytes: picture },
  ]);
  const archive = CFB.read(Buffer.from(made), { type: 'buffer' });
  expect(Buffer.from(CFB.find(archive, 'stages.json')?.content ?? []).toString()).toBe('{"ph":6.8}');
  expect(Uint8Array.from(CFB.find(archive, 'page.png')?.content ?? [])).toEqual(picture);
});
