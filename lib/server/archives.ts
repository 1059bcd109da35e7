import 'server-only';
import { rm } from 'node:fs/promises';
import type { z } from 'zod';
import { inHolding, type Holding } from '@/db/client';
import * as archives from '@/db/queries/archive';
import { addAudit } from '@/db/queries/audit';
import { listChannels } from '@/db/queries/channel';
import { putInService } from '@/db/queries/house';
import { loadHouseConfig } from '@/db/queries/plan';
import { Refusal } from '@/db/queries/refusal';
import type { Archive, ArchiveSend, ArchiveState } from '@/lib/schema/archive';
import type { House } from '@/lib/schema/yard-view';
import { archiveFile } from './archive-file';
import { packed, type Packing } from './archive-pack';
import type { Caller } from './caller';
import { Problem } from './errors';
import type { Answer } from './guard';
import { writePiece } from './import-file';

const DAY_MS = 86_400_000;
const MOST_UNDER_WAY = 2;
const NOTE_EVERY_MS = 500;

interface Act {
  caller: Caller;
  now: Date;
}

/** `larkmoor-growers-2026-12-01.zip` */
export async function askForArchive(holding: Holding, { caller, now }: Act): Promise<Archive> {
  const plain = caller.holdingName
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '');
  const name = `${plain === '' ? 'holding' : plain.slice(0, 60)}-${now.toISOString().slice(0, 10)}.zip`;
  const { by, userId } = caller;
  return archives.createArchive(holding, { way: 'out', state: 'asked', name, by, userId, now });
}

/** Each fetching is a snapshot of its own, and stands in the audit log: it is all that the holding knows. */
export async function archiveAnswer(holding: Holding, one: Archive, { caller, now }: Act): Promise<Answer> {
  if (one.way !== 'out')
    throw new Problem('conflict', { detail: 'This archive came in; ask for one that goes out.' });
  await addAudit(holding, { at: now, by: caller.by, action: 'archive.fetch', subject: one.name, detail: {} });
  return { stream: { type: 'application/zip', name: one.name, parts: sending(holding.id, one.id, now) } };
}

async function* sending(holdingId: string, id: string, now: Date): AsyncGenerator<Uint8Array> {
  const packing: Packing = { rows: 0, ofRows: 0, bytes: 0 };
  const note = (state: ArchiveState) =>
    inHolding(holdingId, (holding) =>
      archives.noteSending(holding, id, {
        ...{ state, done: packing.rows, total: packing.ofRows, bytes: packing.bytes },
        ...(state === 'sending' ? {} : { endedAt: now }),
      }),
    ).catch(() => undefined);
  let told = performance.now();
  let isWhole = false;
  await note('sending');
  try {
    for await (const part of packed(holdingId, now, packing)) {
      yield part;
      if (performance.now() - told < NOTE_EVERY_MS) continue;
      told = performance.now();
      await note('sending');
    }
    isWhole = true;
  } finally {
    await note(isWhole ? 'sent' : 'broken-off');
  }
}

export async function beginArchive(
  holding: Holding,
  given: z.output<typeof ArchiveSend>,
  { caller, now }: Act,
): Promise<Archive> {
  for (const id of await archives.forgetLeft(holding, new Date(now.getTime() - DAY_MS))) await dropFile(id);
  if ((await archives.countUnderWay(holding)) >= MOST_UNDER_WAY)
    throw new Problem('conflict', {
      detail: 'Two archives are under way already; finish or drop one of them.',
    });
  const { by, userId } = caller;
  return archives.createArchive(holding, { ...given, way: 'in', state: 'receiving', by, userId, now });
}

/** A piece that was written before is written again at its place, so that sending it twice does no harm. */
export async function takeArchivePiece(
  holding: Holding,
  one: Archive,
  from: number,
  bytes: Uint8Array,
): Promise<Archive | null> {
  if (one.state !== 'receiving') throw new Problem('conflict', { detail: 'The file is here already.' });
  if (bytes.length === 0 || from + bytes.length > one.bytes)
    throw new Refusal('from', `This piece lies outside the ${one.bytes} bytes that were announced.`);
  const received = from > one.received ? null : await writePiece(archiveFile(one.id), from, bytes);
  if (received === null) throw new Refusal('from', `The piece that begins at ${one.received} comes next.`);
  await archives.noteReceived(holding, one.id, received);
  return archives.findArchive(holding, one.id);
}

/** Hands it on to the worker; whoever asks becomes the owner of what comes in. */
export async function bringArchive(
  holding: Holding,
  one: Archive,
  name: string,
  caller: Caller,
): Promise<Archive | null> {
  const { userId, by } = caller;
  if (userId === null)
    throw new Problem('conflict', {
      detail: 'A person must bring it in, to be the owner of the new holding; sign in for it.',
    });
  const isMoved = await archives.moveArchive(holding, one.id, 'checked', 'to-bring', {
    intoName: name,
    userId,
    by,
  });
  if (!isMoved)
    throw new Problem('conflict', { detail: 'Only an archive that was looked through can be brought in.' });
  return archives.findArchive(holding, one.id);
}

export async function dropArchive(holding: Holding, one: Archive): Promise<void> {
  await archives.removeArchive(holding, one.id);
  await dropFile(one.id);
}

const dropFile = (id: string) => rm(archiveFile(id), { force: true });

/**
 * @throws Refusal where a rule in force would drive a channel that nobody has proved since it came in, unless that is
 * accepted: the same as when a rule is put into force
 */
export async function serveHouse(holding: Holding, house: House, acceptUnproved: boolean): Promise<House> {
  if (house.laidUpAt === null) throw new Refusal(null, `${house.name} is in service already.`);
  const driven = new Set((await loadHouseConfig(holding, house.id))?.rules.map((rule) => rule.channel));
  const unproved = (await listChannels(holding, house.id)).filter(
    (channel) => channel.provedAt === null && driven.has(channel.key),
  );
  if (unproved.length > 0 && !acceptUnproved)
    throw new Refusal(
      null,
      `Nobody has proved ${unproved.map((channel) => channel.label).join(', ')} here, and rules in force drive ${unproved.length === 1 ? 'it' : 'them'}. Prove first, or accept it outright.`,
    );
  return putInService(holding, house.id);
}
