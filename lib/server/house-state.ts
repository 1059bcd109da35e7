import 'server-only';
import type { Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { listLockouts } from '@/db/queries/lockout';
import { listNodes } from '@/db/queries/node';
import { listPoints } from '@/db/queries/point';
import { readMemory } from '@/db/queries/running';
import { listSources } from '@/db/queries/source';
import type { HouseState } from '@/lib/schema/house-state';
import type { HouseStateAnswer } from '@/lib/schema/running';
import type { House } from '@/lib/schema/yard-view';
import { alarmList } from './alarm-answer';
import { isoIn } from './wire';

const MOST_ALARMS = 500;

/** How a house stood at the worker's last step, how long ago that was, and its standing alarms. */
export async function houseStateAnswer(holding: Holding, house: House, now: Date): Promise<HouseStateAnswer> {
  const kept = await readMemory(holding, house.id);
  const state = kept?.state ?? (await unstepped(holding, house, now));
  const at = kept?.stateAt ?? now.getTime();
  const alarms = await alarmList(holding, { state: 'active', limit: MOST_ALARMS }, house.id);
  return { ...state, age: Math.max(0, Math.round((now.getTime() - at) / 1000)), alarms: alarms.items };
}

/**
 * A house that control has not looked at yet: nothing is known of its points, and every load stands as its wiring lets
 * it stand, coil off.
 */
async function unstepped(holding: Holding, house: House, now: Date): Promise<HouseState> {
  const points = await listPoints(holding, house.id);
  const channels = await listChannels(holding, house.id);
  const sources = await listSources(holding, house.id);
  const nodes = await listNodes(holding, house.id);
  const standing = (await listLockouts(holding, house.id)).filter((row) => row.removedAt === null);
  return {
    at: isoIn(house.zone, now.getTime()),
    points: points.map(({ key, name, role, unit }) => ({
      ...{ key, name, role, unit },
      ...{ value: null, at: null, quality: 'bad' as const, why: 'silent' },
    })),
    channels: channels.map(({ number, key, label, contact, provedAt }) => {
      const lockedOut = standing.some((row) => row.channel === key);
      return {
        ...{ number, key, label, lockedOut },
        state: contact === 'NC' ? ('on' as const) : ('off' as const),
        ...{ reported: null, claim: 'fail-safe', because: {}, until: null },
        mode: lockedOut ? ('locked' as const) : ('auto' as const),
        proved: provedAt !== null,
      };
    }),
    sources: sources.map(({ slug, name, kind }) => ({
      ...{ slug, name, kind, credit: 1, restSince: null, restUntil: null, restAtMostUntil: null },
      ...{ drawnToday: 0, drawing: false, underFloor: false },
    })),
    nodes: nodes.map(({ key }) => ({ key, online: false, lastHeardAt: null })),
  };
}
