/** One file of an archive, line by line, held against what the manifest says of it. Holds one piece at a time. */
import 'server-only';
import { createHash } from 'node:crypto';
import { RowFault } from '@/db/queries/archive-rows';
import type { ManifestFile } from '@/lib/schema/archive';
import { ArchiveFault, asFault, type OpenArchive } from './archive-file';

/** Nobody writes so much into one row; a line without an end must not fill the memory. */
const LONGEST_LINE = 1024 ** 2;
const DAMAGED =
  'The file is not the one that the manifest tells of (its SHA-256 differs): it was changed or damaged on its way. Copy the archive again.';
export const MADE_WRONG = 'Make the archive anew where it came from.';

/**
 * @param take is given the lines of each piece, with the number of the first; it throws RowFault after setting `at.line`
 * @param step is told the bytes of each piece
 * @throws ArchiveFault that names the file, the line and what to do
 */
export async function eachLine(
  open: OpenArchive,
  file: ManifestFile,
  take: (lines: readonly string[], at: { line: number }) => Promise<void>,
  step: (bytes: number) => Promise<void>,
): Promise<void> {
  const hash = createHash('sha256');
  const decoder = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });
  const at = { line: 1 };
  let fault: string | null = null;
  let rest = '';
  const read = async (text: string) => {
    const lines = (rest + text).split('\n');
    rest = lines.pop() ?? '';
    await take(lines, at);
    if (rest.length > LONGEST_LINE) throw new RowFault('This line is longer than a million characters.');
  };
  for await (const part of partsOf(open, file.path)) {
    hash.update(part);
    // what is behind a fault is read for the hash alone: damaged on its way, or made wrong?
    if (fault === null) fault = await faultOf(() => read(decoder.decode(part, { stream: true })), at);
    await step(part.byteLength);
  }
  if (fault === null) fault = await faultOf(() => read(decoder.decode()), at);
  const isDamaged = hash.digest('hex') !== file.sha256;
  if (fault === null && rest !== '') fault = `line ${at.line}: This line has no end.`;
  if (fault !== null) throw new ArchiveFault(`${file.path}, ${fault} ${isDamaged ? DAMAGED : MADE_WRONG}`);
  if (isDamaged) throw new ArchiveFault(`${file.path}: ${DAMAGED}`);
}

/** Of a file that is taken whole, such as a picture. */
export async function wholeFile(open: OpenArchive, file: ManifestFile): Promise<Buffer> {
  const parts: Uint8Array[] = [];
  for await (const part of partsOf(open, file.path)) parts.push(part);
  const bytes = Buffer.concat(parts);
  if (createHash('sha256').update(bytes).digest('hex') !== file.sha256)
    throw new ArchiveFault(`${file.path}: ${DAMAGED}`);
  return bytes;
}

/** What goes wrong in reading is the file's; what goes wrong in whoever takes the parts is not. */
async function* partsOf(open: OpenArchive, path: string): AsyncGenerator<Uint8Array> {
  const told = async <T>(work: Promise<T>): Promise<T> => {
    try {
      return await work;
    } catch (error) {
      throw withName(path, asFault(error));
    }
  };
  const stream = await told(open.read(path));
  const parts: AsyncIterator<unknown> = stream[Symbol.asyncIterator]();
  try {
    for (;;) {
      const next = await told(parts.next());
      if (next.done === true) return;
      if (!(next.value instanceof Uint8Array)) throw new Error('a zip gave text where bytes were asked for');
      yield next.value;
    }
  } finally {
    stream.destroy();
  }
}

async function faultOf(work: () => Promise<void>, at: { line: number }): Promise<string | null> {
  try {
    await work();
    return null;
  } catch (error) {
    if (error instanceof RowFault) return `line ${at.line}: ${error.message}`;
    if (error instanceof TypeError && 'code' in error && error.code === 'ERR_ENCODING_INVALID_ENCODED_DATA')
      return `at or after line ${at.line}: This is not text in UTF-8.`;
    throw error;
  }
}

function withName(path: string, error: unknown): unknown {
  return error instanceof ArchiveFault && !error.message.includes(path)
    ? new ArchiveFault(`${path}: ${error.message}`)
    : error;
}
