/** Where files that are brought in lie while they are read: under the data directory, named by the import's id alone. */
import { createReadStream } from 'node:fs';
import { mkdir, open, rm, stat, truncate } from 'node:fs/promises';
import path from 'node:path';
import type { Encoding } from '@/lib/analysis/logger-layout';
import type { FileFault } from '@/lib/analysis/logger-reader';
import { csvLine } from '@/lib/units/csv';
import { env } from './env';

const folder = () => path.resolve(env().DATA_DIR, 'imports');
export const importFile = (id: string) => path.join(folder(), `${id}.csv`);
export const faultFile = (id: string) => path.join(folder(), `${id}.faults.csv`);

/**
 * Writes a piece at its place. What lies behind it is of a try that broke off, and goes.
 * @returns length of the file then; null where the piece does not join on to what is there
 */
export async function writePiece(name: string, from: number, bytes: Uint8Array): Promise<number | null> {
  await mkdir(path.dirname(name), { recursive: true });
  const file = await open(name, from === 0 ? 'w' : 'r+');
  try {
    const { size } = await file.stat();
    if (from > size) return null;
    await file.write(bytes, 0, bytes.length, from);
    await file.truncate(from + bytes.length);
    return from + bytes.length;
  } finally {
    await file.close();
  }
}

/** The file's first bytes, at most `most`. */
export async function firstBytes(id: string, most: number): Promise<Uint8Array> {
  const file = await open(importFile(id), 'r');
  try {
    const { bytesRead, buffer } = await file.read(Buffer.alloc(most), 0, most, 0);
    return buffer.subarray(0, bytesRead);
  } finally {
    await file.close();
  }
}

export function decoderOf(encoding: Encoding): TextDecoder {
  return new TextDecoder(encoding);
}

const PIECE_BYTES = 64 * 1024;

/** The file as text, piece by piece, with how many bytes are read by then. Holds one piece at a time. */
export async function* textOf(
  id: string,
  encoding: Encoding,
): AsyncGenerator<{ text: string; done: number }> {
  const decoder = decoderOf(encoding);
  let done = 0;
  for await (const piece of createReadStream(importFile(id), { highWaterMark: PIECE_BYTES })) {
    if (!(piece instanceof Uint8Array)) throw new Error('a file gave text where bytes were asked for');
    done += piece.byteLength;
    yield { text: decoder.decode(piece, { stream: true }), done };
  }
  yield { text: decoder.decode(), done };
}

/** Adds to the file of faults, after cutting off what was written past `from` by a try that broke off. */
export async function addFaults(id: string, from: number, text: string): Promise<number> {
  await mkdir(folder(), { recursive: true });
  const file = await open(faultFile(id), 'a');
  try {
    const { size } = await file.stat();
    if (size > from) await truncate(faultFile(id), from);
    if (text !== '') await file.appendFile(text);
    return (await file.stat()).size;
  } finally {
    await file.close();
  }
}

const FAULT_HEAD = csvLine(['line', 'what_is_wrong', 'text']);

export function faultLines(faults: readonly FileFault[]): string {
  return faults.map(({ line, why, text }) => csvLine([line, why, text])).join('');
}

/** The lines that could not be read, under a head; the head alone where every line could be. */
export async function* faultText(id: string): AsyncGenerator<string> {
  yield FAULT_HEAD;
  const found = await stat(faultFile(id)).catch(() => null);
  if (found === null) return;
  for await (const part of createReadStream(faultFile(id), { encoding: 'utf8' })) yield String(part);
}

/** The file itself; that of faults stays, to be fetched. */
export async function dropFile(id: string): Promise<void> {
  await rm(importFile(id), { force: true });
}

export async function dropAll(id: string): Promise<void> {
  await Promise.all([rm(importFile(id), { force: true }), rm(faultFile(id), { force: true })]);
}
