// Archives as a stranger has them: files in a zip, to be looked into, changed, and packed again.
import { createHash } from 'node:crypto';
import { fromBufferPromise } from 'yauzl';
import { ZipFile } from 'yazl';
import { Manifest, MANIFEST } from '@/lib/schema/archive';

export type Files = Map<string, Buffer>;

async function gathered(stream: AsyncIterable<unknown>): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(Buffer.from(part as Uint8Array));
  return Buffer.concat(parts);
}

export async function unzipped(bytes: Buffer): Promise<Files> {
  const zip = await fromBufferPromise(bytes, { lazyEntries: true });
  const files: Files = new Map();
  for await (const entry of zip.eachEntry())
    files.set(entry.fileName, await gathered(await zip.openReadStreamPromise(entry)));
  return files;
}

export async function zipped(files: Files): Promise<Buffer> {
  const zip = new ZipFile();
  for (const [name, bytes] of files) zip.addBuffer(bytes, name);
  zip.end();
  return gathered(zip.outputStream as AsyncIterable<unknown>);
}

export function manifestOf(files: Files): Manifest {
  return Manifest.parse(JSON.parse(files.get(MANIFEST)?.toString('utf8') ?? ''));
}

/** Tells the manifest what the files are by now, as whoever makes an archive of their own would. */
export function withManifest(files: Files, change: Partial<Record<keyof Manifest, unknown>> = {}): Files {
  const before = manifestOf(files);
  const told = [...files]
    .filter(([name]) => name !== MANIFEST)
    .map(([path, bytes]) => {
      const lines = bytes.toString('latin1').split('\n').length - 1;
      const rows = path.endsWith('.jpg') ? null : path.endsWith('.csv') ? lines - 1 : lines;
      return { path, bytes: bytes.length, rows, sha256: createHash('sha256').update(bytes).digest('hex') };
    });
  return new Map(files).set(MANIFEST, Buffer.from(JSON.stringify({ ...before, files: told, ...change })));
}

/** One file's text changed, the manifest left as it was. */
export function edited(files: Files, name: string, change: (text: string) => string): Files {
  return new Map(files).set(name, Buffer.from(change(files.get(name)?.toString('utf8') ?? '')));
}

export function rowsOf(files: Files, table: string): Record<string, unknown>[] {
  const text = files.get(`tables/${table}.jsonl`)?.toString('utf8') ?? '';
  return text
    .split('\n')
    .flatMap((line) => (line === '' ? [] : [JSON.parse(line) as Record<string, unknown>]));
}
