// An archive's way in, as the page and the worker walk it, from bytes at hand.
import pino from 'pino';
import { everyPool } from '@/db/client';
import { LARGEST_PIECE } from '@/lib/schema/import';
import { clockFrom } from '@/worker/clock';
import { runArchives } from '@/worker/jobs/archive-run';
import type { Asker, Json } from '../api/asker';

/** App time stands still, so that what lasts is the same each time. */
export const workAt = (appAt: number, isLeading = () => true) =>
  runArchives({
    ...{ pool: everyPool(), clock: clockFrom({ rate: 0, realAt: 0, appAt }), log: pino({ level: 'silent' }) },
    isLeading,
  });

export async function fetched(owner: Asker): Promise<Buffer> {
  const asked = await owner.make('/archives/out', {});
  const told = await owner.get(`/archives/${String(asked['id'])}/file`);
  if (told.status !== 200) throw new Error(`the archive answered ${told.status}: ${told.text}`);
  return told.bytes;
}

/** Sends it whole. @returns its path under /api/v1 */
export async function sent(owner: Asker, bytes: Buffer, name = 'holding.zip'): Promise<string> {
  const made = await owner.make('/archives/in', { name, bytes: bytes.length });
  const path = `/archives/${String(made['id'])}`;
  for (let from = 0; from < bytes.length; from += LARGEST_PIECE) {
    const told = await owner.ask(
      'PUT',
      `${path}/piece?from=${from}`,
      bytes.subarray(from, from + LARGEST_PIECE),
    );
    if (told.status !== 200) throw new Error(`a piece answered ${told.status}: ${told.text}`);
  }
  return path;
}

/** What looking it through told. */
export async function lookedThrough(owner: Asker, bytes: Buffer, appAt: number): Promise<Json> {
  const path = await sent(owner, bytes);
  await workAt(appAt);
  const told = (await owner.get(path)).body;
  await owner.ask('DELETE', path);
  return told;
}

export async function broughtIn(owner: Asker, bytes: Buffer, name: string, appAt: number): Promise<Json> {
  const path = await sent(owner, bytes);
  await workAt(appAt);
  const told = await owner.ask('POST', `${path}/bring`, { name });
  if (told.status !== 200)
    throw new Error(`it was not brought: ${told.text} ${(await owner.get(path)).text}`);
  await workAt(appAt);
  return (await owner.get(path)).body;
}
