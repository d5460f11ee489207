import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { deflateSync } from 'node:zlib';
import { createWorker, OEM, PSM } from 'tesseract.js';
import type { Grey } from '../pictures/types';

/** How the engine looks at a picture: words strewn over a form, one block of lines, columns of text, one line, one word. */
export type PageMode = 'sparse' | 'block' | 'auto' | 'line' | 'word';

const MODES: Readonly<Record<PageMode, PSM>> = {
  sparse: PSM.SPARSE_TEXT,
  block: PSM.SINGLE_BLOCK,
  auto: PSM.AUTO,
  line: PSM.SINGLE_LINE,
  word: PSM.SINGLE_WORD,
};

/** A word as the engine saw it; box in points of the picture, certainty 0 to 1. */
export type SeenWord = {
  readonly text: string;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
  readonly certainty: number;
};

export type Engine = {
  read(picture: Grey, mode: PageMode, only?: string): Promise<SeenWord[]>;
  close(): Promise<void>;
};

const CRC = Array.from({ length: 256 }, (_, index) => {
  let value = index;
  for (let bit = 0; bit < 8; bit++) value = value & 1 ? 0xedb88320 ^ (value >>> 1) : value >>> 1;
  return value >>> 0;
});

function chunk(type: string, body: Uint8Array): Buffer {
  const head = Buffer.alloc(8);
  head.writeUInt32BE(body.length, 0);
  head.write(type, 4, 'latin1');
  const typed = Buffer.concat([head.subarray(4), body]);
  let crc = 0xffffffff;
  for (const byte of typed) crc = (CRC[(crc ^ byte) & 0xff] ?? 0) ^ (crc >>> 8);
  const tail = Buffer.alloc(4);
  tail.writeUInt32BE((crc ^ 0xffffffff) >>> 0, 0);
  return Buffer.concat([head.subarray(0, 4), typed, tail]);
}

/** The smallest PNG that the engine takes: grey, hardly packed, because packing well costs more time than it saves. */
export function pngOf({ width, height, data }: Grey): Buffer {
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([8, 0, 0, 0, 0], 8);
  const rows = Buffer.alloc((width + 1) * height);
  for (let y = 0; y < height; y++) rows.set(data.subarray(y * width, (y + 1) * width), y * (width + 1) + 1);
  return Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    chunk('IHDR', head),
    chunk('IDAT', deflateSync(rows, { level: 1 })),
    chunk('IEND', new Uint8Array()),
  ]);
}

/** The language data ships as a package; nothing is fetched and nothing is written. */
function languageFolder(): string {
  const packageFile = createRequire(import.meta.url).resolve('@tesseract.js-data/eng/package.json');
  return join(dirname(packageFile), '4.0.0_best_int');
}

/** Starts the engine; one for a process is enough, and its start takes a fraction of a second. */
export async function openEngine(): Promise<Engine> {
  const worker = await createWorker('eng', OEM.LSTM_ONLY, {
    langPath: languageFolder(),
    gzip: true,
    cacheMethod: 'none',
    errorHandler: () => undefined,
  });
  return {
    async read(picture, mode, only = '') {
      await worker.setParameters({
        tessedit_pageseg_mode: MODES[mode],
        tessedit_char_whitelist: only,
        user_defined_dpi: '300',
      });
      const { data } = await worker.recognize(pngOf(picture), {}, { blocks: true, text: false });
      const words: SeenWord[] = [];
      for (const block of data.blocks ?? []) {
        for (const paragraph of block.paragraphs) {
          for (const line of paragraph.lines) {
            for (const word of line.words) {
              if (word.text.trim() === '') continue;
              words.push({ text: word.text, ...word.bbox, certainty: Math.max(0, word.confidence) / 100 });
            }
          }
        }
      }
      return words;
    },
    async close() {
      await worker.terminate();
    },
  };
}
