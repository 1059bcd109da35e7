/** What the proving page of a channel shows. */
import 'server-only';
import { inHolding } from '@/db/client';
import { findChannel } from '@/db/queries/channel';
import { listLockouts } from '@/db/queries/lockout';
import { findNode } from '@/db/queries/node';
import { findSource } from '@/db/queries/source';
import type { Proof } from '@/lib/schema/proof';
import type { Channel, House } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { toLocal } from '@/lib/units/local-time';
import type { Viewer } from './auth';
import { tellProofs } from './proofs';
import { shellFacts } from './shell';

interface ProvingPage {
  house: House;
  channel: Channel;
  isHeapFan: boolean;
  reportEvery: number;
  preferences: Preferences;
  today: string;
  proof: Proof | null;
  former: Proof[];
  lockout: { by: string; why: string } | null;
}

const REPORT_S = 30;

/** @returns null where the house has no such channel */
export async function provingPage(viewer: Viewer, house: House, ref: string): Promise<ProvingPage | null> {
  const { preferences, now } = await shellFacts(viewer);
  return inHolding(viewer.holdingId, async (holding) => {
    const channel = await findChannel(holding, house.id, ref);
    if (channel === null) return null;
    const source = channel.source === null ? null : await findSource(holding, house.id, channel.source);
    const node = await findNode(holding, house.id, channel.node);
    const proofs = await tellProofs(holding, house, channel.id, new Date(now));
    const lockouts = await listLockouts(holding, house.id);
    const lockout = lockouts.find((one) => one.channel === channel.key && one.removedAt === null);
    return {
      ...{ house, channel, preferences },
      isHeapFan: source?.kind === 'heap' && channel.load.kind === 'motor',
      reportEvery: node?.reportEvery ?? REPORT_S,
      today: toLocal(now, house.zone).slice(0, 10),
      proof: proofs.find((one) => one.endedAt === null) ?? null,
      former: proofs.filter((one) => one.endedAt !== null),
      lockout: lockout === undefined ? null : { by: lockout.by, why: lockout.why },
    };
  });
}
