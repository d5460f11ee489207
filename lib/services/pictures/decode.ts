import sharp from 'sharp';
import type { Grey } from './types';

/** Beyond this a picture is refused before a single point of it is decoded. */
export const MAX_PIXELS = 40_000_000;
/** More points than this along the longer side say nothing more about type that a person can read. */
const LONGEST = 4400;

export type Decoded =
  | {
      readonly ok: true;
      readonly picture: Grey;
      /** Points a unit of the file's own size: the picture may have been reduced while it was decoded. */
      readonly width: number;
      readonly height: number;
    }
  | { readonly ok: false; readonly reason: 'picture-broken' | 'picture-truncated' | 'picture-too-large' };

/** Turned as the camera's note says (EXIF orientation 1 to 8). */
function turned(picture: Grey, orientation: number): Grey {
  if (orientation <= 1 || orientation > 8) return picture;
  const { width: w, height: h, data } = picture;
  const swap = orientation >= 5;
  const [width, height] = swap ? [h, w] : [w, h];
  const out = new Uint8Array(data.length);
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      const [sx, sy] =
        orientation === 2
          ? [w - 1 - x, y]
          : orientation === 3
            ? [w - 1 - x, h - 1 - y]
            : orientation === 4
              ? [x, h - 1 - y]
              : orientation === 5
                ? [y, x]
                : orientation === 6
                  ? [y, h - 1 - x]
                  : orientation === 7
                    ? [w - 1 - y, h - 1 - x]
                    : [w - 1 - y, x];
      out[y * width + x] = data[sy * w + sx] ?? 255;
    }
  }
  return { width, height, data: out };
}

const isPng = (bytes: Uint8Array) => bytes[0] === 0x89;

/** Points that the header of a PNG states; the decoder takes some of them for a fault instead of for too many. */
function statedPixels(bytes: Uint8Array): number {
  if (!isPng(bytes) || bytes.length < 24 || Buffer.from(bytes.subarray(12, 16)).toString('latin1') !== 'IHDR') return 0;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  return view.getUint32(16) * view.getUint32(20);
}

/** A picture that could not be opened and lacks the mark with which its kind ends. */
function isCutOff(bytes: Uint8Array): boolean {
  const tail = Buffer.from(bytes.subarray(Math.max(0, bytes.length - 4096)));
  return isPng(bytes) ? !tail.includes('IEND') : tail.lastIndexOf(Buffer.from([0xff, 0xd9])) < 0;
}

/** PNG or JPEG to a grey picture, turned upright after its EXIF note. Its size is judged from the header alone. */
export async function decodePicture(bytes: Uint8Array): Promise<Decoded> {
  sharp.cache(false);
  sharp.concurrency(1);
  if (statedPixels(bytes) > MAX_PIXELS) return { ok: false, reason: 'picture-too-large' };
  try {
    const open = () => sharp(bytes, { limitInputPixels: MAX_PIXELS, failOn: 'error', sequentialRead: true });
    const head = await open().metadata();
    if (head.width * head.height > MAX_PIXELS) return { ok: false, reason: 'picture-too-large' };
    const decoded = await open()
      .flatten({ background: '#ffffff' })
      .resize({ width: LONGEST, height: LONGEST, fit: 'inside', withoutEnlargement: true })
      .greyscale()
      .toColourspace('b-w')
      .raw({ depth: 'uchar' })
      .toBuffer({ resolveWithObject: true });
    const { width, height, channels } = decoded.info;
    if (channels !== 1) return { ok: false, reason: 'picture-broken' };
    const picture = turned({ width, height, data: new Uint8Array(decoded.data) }, head.orientation ?? 1);
    return { ok: true, picture, width: picture.width, height: picture.height };
  } catch (error) {
    const message = error instanceof Error ? error.message : '';
    if (/pixel limit|too large/i.test(message)) return { ok: false, reason: 'picture-too-large' };
    return { ok: false, reason: isCutOff(bytes) ? 'picture-truncated' : 'picture-broken' };
  }
}
