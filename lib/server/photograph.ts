import 'server-only';
import sharp from 'sharp';
import type { MadePhotograph } from '@/db/queries/attachment';
import { Problem } from './errors';

/** A phone's largest picture has some 50 million points; a small file that claims more is a trap for the memory. */
const MOST_PIXELS = 64_000_000;
const LONG_SIDE = 2000;
const SMALL_SIDE = 320;

// one picture at a time and nothing kept: the process is there for pages
sharp.concurrency(1);
sharp.cache(false);

type Kind = 'jpeg' | 'png' | 'webp';

/** What a file is by its first bytes, whatever it is called; null for anything else. */
export function kindOfBytes(bytes: Uint8Array): Kind | null {
  const at = (from: number, to: number) => Buffer.from(bytes.subarray(from, to)).toString('latin1');
  if (at(0, 3) === '\xff\xd8\xff') return 'jpeg';
  if (at(0, 8) === '\x89PNG\r\n\x1a\n') return 'png';
  if (at(0, 4) === 'RIFF' && at(8, 12) === 'WEBP') return 'webp';
  return null;
}

/**
 * The picture made anew as JPEG, upright, its long side 2000 points at most, and small. Nothing of the file's hidden words
 * is taken over: not the place, not the camera, not the colour profile beyond its effect.
 * @throws Problem `not-valid` for what is no JPEG, PNG or WebP, or broken
 */
export async function madeAnew(bytes: Uint8Array): Promise<MadePhotograph> {
  const kind = kindOfBytes(bytes);
  if (kind === null) throw refuse('This is no JPEG, PNG or WebP picture.');
  try {
    const read = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error', pages: 1 });
    if ((await read.metadata()).format !== kind) throw refuse('This picture is not what it begins as.');
    const upright = read.autoOrient().flatten({ background: '#ffffff' });
    const whole = await upright
      .clone()
      .resize({ width: LONG_SIDE, height: LONG_SIDE, fit: 'inside', withoutEnlargement: true })
      .jpeg({ quality: 82, mozjpeg: false })
      .toBuffer({ resolveWithObject: true });
    const { width, height } = whole.info;
    return { width, height, image: whole.data, thumbnail: await smallOf(whole.data) };
  } catch (error) {
    if (error instanceof Problem) throw error;
    throw refuse('This picture is broken, or larger than 64 million points.');
  }
}

/**
 * A picture out of an archive. One that was made here and carries no hidden words stays byte for byte, or it would grow
 * dimmer with each way out and in; any other is made anew.
 * @throws Problem `not-valid`
 */
export async function madeBefore(bytes: Buffer): Promise<MadePhotograph> {
  if (kindOfBytes(bytes) !== 'jpeg') return madeAnew(bytes);
  try {
    const read = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error', pages: 1 });
    const { format, width, height, exif, iptc, xmp, icc, comments } = await read.metadata();
    const isBare = [exif, iptc, xmp, icc, comments].every((words) => words === undefined);
    if (format !== 'jpeg' || !isBare || Math.max(width, height) > LONG_SIDE) return await madeAnew(bytes);
    return { width, height, image: bytes, thumbnail: await smallOf(bytes) };
  } catch (error) {
    if (error instanceof Problem) throw error;
    throw refuse('This picture is broken, or larger than 64 million points.');
  }
}

function smallOf(whole: Buffer): Promise<Buffer> {
  return sharp(whole, { limitInputPixels: MOST_PIXELS, failOn: 'error' })
    .resize({ width: SMALL_SIDE, height: SMALL_SIDE, fit: 'inside', withoutEnlargement: true })
    .jpeg({ quality: 72 })
    .toBuffer();
}

function refuse(message: string): Problem {
  return new Problem('not-valid', { errors: [{ path: '', message }] });
}
