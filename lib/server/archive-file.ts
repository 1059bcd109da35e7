/**
 * Reads an archive that somebody sent. Nothing is unpacked to disk: files are read out of the zip as streams, each no
 * longer than it says, so that no name in it can reach a path of ours, and a bomb is told by its directory.
 */
import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import path from 'node:path';
import type { Readable } from 'node:stream';
import { type Entry, openPromise, type ZipFile } from 'yauzl';
import { ARCHIVE_TABLES } from '@/db/queries/archive-tables';
import {
  ARCHIVE_VERSION,
  LARGEST_MANIFEST,
  Manifest,
  MANIFEST,
  ManifestHead,
  PEOPLE,
  photographPath,
  readingsPath,
  tablePath,
} from '@/lib/schema/archive';
import { env } from './env';

/** What is wrong with an archive, in words for whoever sent it: the file within, the line, and what to do. */
export class ArchiveFault extends Error {
  override readonly name = 'ArchiveFault';
}

export const archiveFolder = () => path.resolve(env().DATA_DIR, 'archives');
export const archiveFile = (id: string) => path.join(archiveFolder(), `${id}.zip`);

const MOST_ENTRIES = 20_000;
/** Tables of rows shrink to an eighth or so, the dullest to a thirtieth; a bomb shrinks to a thousandth. */
const MOST_TIMES = 100;
const SMALL_BYTES = 1024 ** 2;
const MOST_UNPACKED = 200 * 1024 ** 3;
const MOST_OF_PICTURE = 10 * 1024 ** 2;
const MAKE_ANEW = 'Make the archive anew where it came from, or copy it again.';

const NAMES = new Set([MANIFEST, PEOPLE, ...ARCHIVE_TABLES.map((one) => tablePath(one.name))]);
const MONTH = /^readings\/(2[01]\d\d-(?:0[1-9]|1[0-2]))\.csv$/;
const PICTURE = /^photographs\/([0-9a-f-]{36})\.jpg$/;

function isKnown(name: string): boolean {
  const month = MONTH.exec(name)?.[1];
  const picture = PICTURE.exec(name)?.[1];
  return (
    NAMES.has(name) ||
    (month !== undefined && readingsPath(month) === name) ||
    (picture !== undefined && photographPath(picture) === name)
  );
}

/** Months of readings inside, in order. */
export const monthsOf = (manifest: Manifest) =>
  manifest.files.flatMap((file) => MONTH.exec(file.path)?.[1] ?? []).sort();

export interface OpenArchive {
  manifest: Manifest;
  read: (name: string) => Promise<Readable>;
  close: () => void;
}

/**
 * Opens it and looks at everything that can be told before a row is read.
 * @param schema how many migrations this database has
 * @throws ArchiveFault
 */
export async function openArchive(file: string, schema: number): Promise<OpenArchive> {
  let zip: ZipFile;
  try {
    zip = await openPromise(file, { autoClose: false, lazyEntries: true, strictFileNames: true });
  } catch (error) {
    throw asFault(error);
  }
  try {
    const entries = await entriesOf(zip, (await stat(file)).size);
    const read = (name: string) => readEntry(zip, entries, name);
    const manifest = await manifestOf(await read(MANIFEST), schema);
    compare(manifest, entries);
    return { manifest, read, close: () => zip.close() };
  } catch (error) {
    zip.close();
    throw asFault(error);
  }
}

async function entriesOf(zip: ZipFile, size: number): Promise<Map<string, Entry>> {
  if (zip.entryCount > MOST_ENTRIES)
    throw new ArchiveFault(`This zip names ${zip.entryCount} files; an archive has fewer.`);
  const entries = new Map<string, Entry>();
  let [packed, unpacked] = [0, 0];
  for await (const entry of zip.eachEntry()) {
    const { fileName, compressedSize, uncompressedSize } = entry;
    // folders are not needed, and some programs write them
    if (fileName.endsWith('/') && uncompressedSize === 0) continue;
    if (!isKnown(fileName))
      throw new ArchiveFault(
        `${shown(fileName)} is no file of an archive of version ${ARCHIVE_VERSION}. ${MAKE_ANEW}`,
      );
    if (entries.has(fileName)) throw new ArchiveFault(`${fileName} is there twice. ${MAKE_ANEW}`);
    if (!entry.canDecodeFileData())
      throw new ArchiveFault(`${fileName} is encrypted, or packed in a way other than deflate. ${MAKE_ANEW}`);
    packed += compressedSize;
    unpacked += uncompressedSize;
    const isBomb = uncompressedSize > SMALL_BYTES && uncompressedSize > MOST_TIMES * compressedSize;
    const most =
      fileName === MANIFEST ? LARGEST_MANIFEST : PICTURE.test(fileName) ? MOST_OF_PICTURE : MOST_UNPACKED;
    if (isBomb || uncompressedSize > most || unpacked > MOST_UNPACKED)
      throw new ArchiveFault(
        `${fileName} would unpack to ${uncompressedSize} bytes, which no honest archive holds; nothing of it was read.`,
      );
    entries.set(fileName, entry);
  }
  // files that lie over one another are how a small zip unpacks without end
  if (packed > size)
    throw new ArchiveFault('Files of this zip lie over one another; nothing of it was read.');
  return entries;
}

async function readEntry(zip: ZipFile, entries: ReadonlyMap<string, Entry>, name: string): Promise<Readable> {
  const entry = entries.get(name);
  if (entry === undefined)
    throw new ArchiveFault(
      name === MANIFEST
        ? 'This zip has no manifest.json at its top, so it is no archive of a holding. Choose the file that was fetched from the page of files, as it is.'
        : `${name} is missing. ${MAKE_ANEW}`,
    );
  return zip.openReadStreamPromise(entry);
}

async function manifestOf(stream: Readable, schema: number): Promise<Manifest> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(Buffer.from(part as Uint8Array));
  let given: unknown;
  try {
    given = JSON.parse(Buffer.concat(parts).toString('utf8'));
  } catch {
    throw new ArchiveFault(`${MANIFEST} is not JSON. ${MAKE_ANEW}`);
  }
  const head = ManifestHead.safeParse(given);
  if (!head.success)
    throw new ArchiveFault(`${MANIFEST} is not that of an archive of a holding. ${MAKE_ANEW}`);
  if (head.data.version !== ARCHIVE_VERSION)
    throw new ArchiveFault(
      `This archive is of version ${head.data.version}; this installation reads version ${ARCHIVE_VERSION}. Bring this installation up to date, then send the archive again.`,
    );
  const told = Manifest.safeParse(given);
  if (!told.success) {
    const [issue] = told.error.issues;
    throw new ArchiveFault(
      `${MANIFEST}, ${issue?.path.join('.') ?? ''}: ${issue?.message ?? 'not valid'}. ${MAKE_ANEW}`,
    );
  }
  if (told.data.schema > schema)
    throw new ArchiveFault(
      `This archive was made by a newer installation (schema ${told.data.schema}; this one has ${schema}). Bring this installation up to date, then send the archive again.`,
    );
  return told.data;
}

function compare(manifest: Manifest, entries: ReadonlyMap<string, Entry>): void {
  const told = new Set(manifest.files.map((file) => file.path));
  if (told.size !== manifest.files.length)
    throw new ArchiveFault(`${MANIFEST} names a file twice. ${MAKE_ANEW}`);
  for (const name of entries.keys())
    if (name !== MANIFEST && !told.has(name))
      throw new ArchiveFault(`${shown(name)} is not in ${MANIFEST}. ${MAKE_ANEW}`);
  for (const { path: name, bytes } of manifest.files) {
    const entry = entries.get(name);
    if (entry === undefined)
      throw new ArchiveFault(`${shown(name)} is in ${MANIFEST}, but not in the zip. ${MAKE_ANEW}`);
    if (entry.uncompressedSize !== bytes)
      throw new ArchiveFault(
        `${name} has ${entry.uncompressedSize} bytes; ${MANIFEST} says ${bytes}. ${MAKE_ANEW}`,
      );
  }
}

const shown = (name: string) => JSON.stringify(name.slice(0, 100));

/** What yauzl finds wrong is told in its words, behind ours. */
export function asFault(error: unknown): unknown {
  if (error instanceof ArchiveFault || !(error instanceof Error)) return error;
  if ('code' in error && typeof error.code === 'string' && /^E[A-Z]+$/.test(error.code)) return error;
  return new ArchiveFault(
    `This file cannot be read as a zip (${error.message}). Choose the file that was fetched from the page of files, as it is.`,
  );
}

export async function sha256Of(file: string): Promise<string> {
  const hash = createHash('sha256');
  for await (const part of createReadStream(file)) hash.update(part as Uint8Array);
  return hash.digest('hex');
}
