/** Packs a holding: table after table, month after month, through one buffer, into a zip that is sent while it is made. */
import 'server-only';
import { createHash } from 'node:crypto';
import { finished } from 'node:stream/promises';
import { Readable } from 'node:stream';
import { ZipFile } from 'yazl';
import { ArchiveSnapshot } from '@/db/queries/archive-out';
import { ARCHIVE_TABLES, LEFT_OUT } from '@/db/queries/archive-tables';
import {
  ARCHIVE_FORMAT,
  ARCHIVE_VERSION,
  MANIFEST,
  type Manifest,
  type ManifestFile,
  PEOPLE,
  photographPath,
  readingsPath,
  tablePath,
} from '@/lib/schema/archive';

export interface Packing {
  rows: number;
  ofRows: number;
  /** Packed so far. */
  bytes: number;
}

/**
 * The archive's bytes, made no faster than they are taken. Whoever stops taking them ends the snapshot.
 * @param packing is kept up while it goes on
 */
export async function* packed(holdingId: string, now: Date, packing: Packing): AsyncGenerator<Uint8Array> {
  const snapshot = await ArchiveSnapshot.take(holdingId);
  const zip = new ZipFile();
  const output = zip.outputStream;
  // it is a PassThrough, which the types hide
  if (!(output instanceof Readable)) throw new Error('the zip gives no stream that can be ended');
  zip.on('error', (error: Error) => output.destroy(error));
  const gone = new AbortController();
  const filling = fill(zip, snapshot, { now, packing, gone: gone.signal }).catch((error: unknown) => {
    output.destroy(error instanceof Error ? error : new Error(String(error)));
  });
  try {
    for await (const chunk of output) {
      if (!(chunk instanceof Uint8Array)) throw new Error('an archive gave text where bytes were asked for');
      packing.bytes += chunk.byteLength;
      yield chunk;
    }
  } finally {
    gone.abort();
    await snapshot.end();
    output.destroy();
    await filling;
  }
}

interface Filling {
  now: Date;
  packing: Packing;
  /** Nobody takes any more: what waits to be taken would wait for ever. */
  gone: AbortSignal;
}

async function fill(zip: ZipFile, snapshot: ArchiveSnapshot, filling: Filling): Promise<void> {
  const { now, packing } = filling;
  const months = await snapshot.months();
  packing.ofRows = (await snapshot.countRows()) + months.reduce((sum, one) => sum + one.readings, 0);
  const files: ManifestFile[] = [];
  const add = async (path: string, parts: AsyncIterable<Buffer>, kind: 'lines' | 'table' | 'picture') => {
    files.push(await addFile(zip, path, parts, kind, filling));
  };
  await add(PEOPLE, snapshot.people(), 'lines');
  for (const one of ARCHIVE_TABLES) await add(tablePath(one.name), snapshot.table(one), 'lines');
  for (const { month } of months) await add(readingsPath(month), snapshot.readings(month), 'table');
  for (const id of await snapshot.photographs())
    await add(photographPath(id), Readable.from([await snapshot.photograph(id)]), 'picture');
  const manifest: Manifest = {
    ...{ format: ARCHIVE_FORMAT, version: ARCHIVE_VERSION, schema: snapshot.schemaNumber },
    ...{ madeAt: now.toISOString(), holding: snapshot.holding, leftOut: [...LEFT_OUT], files },
  };
  zip.addBuffer(Buffer.from(`${JSON.stringify(manifest, null, 1)}\n`), MANIFEST, { mtime: now });
  zip.end();
}

async function addFile(
  zip: ZipFile,
  path: string,
  parts: AsyncIterable<Buffer>,
  kind: 'lines' | 'table' | 'picture',
  { now, packing, gone }: Filling,
): Promise<ManifestFile> {
  const hash = createHash('sha256');
  let [bytes, lines] = [0, 0];
  async function* metered() {
    for await (const part of parts) {
      hash.update(part);
      bytes += part.byteLength;
      const ends = kind === 'picture' ? 0 : lineEnds(part);
      lines += ends;
      packing.rows += ends;
      yield part;
    }
  }
  const stream = Readable.from(metered(), { objectMode: false, signal: gone });
  // a picture is packed already
  zip.addReadStream(stream, path, { mtime: now, compress: kind !== 'picture' });
  await finished(stream, { writable: false });
  const rows = kind === 'picture' ? null : kind === 'table' ? lines - 1 : lines;
  return { path, bytes, rows, sha256: hash.digest('hex') };
}

function lineEnds(part: Buffer): number {
  let count = 0;
  for (let at = part.indexOf(10); at !== -1; at = part.indexOf(10, at + 1)) count += 1;
  return count;
}
