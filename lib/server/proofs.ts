/** Proofs as routes and pages ask for them. */
import 'server-only';
import type { Holding } from '@/db/client';
import { findChannel } from '@/db/queries/channel';
import * as kept from '@/db/queries/proof';
import type { Proof } from '@/lib/schema/proof';
import type { Channel, House } from '@/lib/schema/yard-view';
import { Problem } from './errors';
import { endedProof, standingProof, toProof } from './proof-view';

/** The channel that a proof is of, as it is wired now; one that was taken out of use is proved no more. */
export async function channelOf(
  holding: Holding,
  house: House,
  proof: Pick<kept.KeptProof, 'channelId'>,
): Promise<Channel> {
  const channel = await findChannel(holding, house.id, proof.channelId);
  if (channel === null)
    throw new Problem('conflict', {
      detail: 'This channel was taken out of use; its proof stays to be read.',
    });
  return channel;
}

export async function tellProof(
  holding: Holding,
  house: House,
  proof: kept.KeptProof,
  now: Date,
): Promise<Proof> {
  const channel = proof.endedAt === null ? await findChannel(holding, house.id, proof.channelId) : null;
  // of a channel that was taken out of use only what was put down is left to tell
  const standing =
    channel === null
      ? await endedProof(holding, proof)
      : await standingProof(holding, { house, channel, now }, proof);
  return toProof(standing);
}

/** Newest first; of one channel (key, number or id), or of all. */
export async function tellProofs(
  holding: Holding,
  house: House,
  channel: string | undefined,
  now: Date,
): Promise<Proof[]> {
  const own = channel === undefined ? undefined : await findChannel(holding, house.id, channel);
  if (own === null) return [];
  const all = await kept.listProofs(holding, house.id, own?.id);
  const told: Proof[] = [];
  for (const one of all) told.push(await tellProof(holding, house, one, now));
  return told;
}

/** Begins one, or goes on with the one that is open. */
export async function beginOrGoOn(
  holding: Holding,
  house: House,
  channelRef: string,
  act: { by: string; now: Date },
): Promise<{ proof: Proof; isNew: boolean }> {
  const channel = await findChannel(holding, house.id, channelRef);
  if (channel === null)
    throw new Problem('not-valid', {
      errors: [{ path: 'channel', message: `This house has no channel ${JSON.stringify(channelRef)}.` }],
    });
  const open = await kept.openProof(holding, house.id, channel.id);
  const proof = open ?? (await kept.beginProof(holding, house.id, channel, act));
  return { proof: await tellProof(holding, house, proof, act.now), isNew: open === null };
}
