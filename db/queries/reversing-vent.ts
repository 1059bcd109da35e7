import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { ChannelCreate } from '@/lib/schema/channel';
import type { ReversingVent, ReversingVentCreate } from '@/lib/schema/reversing-vent';
import type { Channel, House } from '@/lib/schema/yard-view';
import { createChannel, listChannels } from './channel';
import { createInterlock } from './interlock';
import { houseNames } from './reference';
import { Refusal } from './refusal';

type Given = z.infer<typeof ReversingVentCreate>;
type Place = Pick<House, 'id' | 'zone'>;

const WAYS = ['open', 'shut'] as const;
type Way = (typeof WAYS)[number];
const DOING: Record<Way, string> = { open: 'opening', shut: 'shutting' };

const keyOf = (given: Given, way: Way) => `${given.key}-${way}`;

/**
 * The channel of one way. It falls to off, so that a vent that nobody commands stays where it stands; no least times,
 * since a way that must wait out its own would keep the other from its turn: the dead time is the interlock's.
 */
function channelOf(given: Given, way: Way): z.infer<typeof ChannelCreate> {
  const { node, load, longestOn, startsPerHour, protection } = given;
  return ChannelCreate.parse({
    ...{ node, longestOn, startsPerHour, protection, ...given[way] },
    key: keyOf(given, way),
    label: `${given.label}, ${DOING[way]}`,
    contact: 'NO',
    load: { kind: 'vent', ...load },
    minOn: 0,
    minOff: 0,
  });
}

/** @throws Refusal at the field of what another channel of the house has already */
function refuseTaken(given: Given, node: string, others: Channel[]): void {
  for (const way of WAYS) {
    const { number, relay } = given[way];
    const byNumber = others.find((one) => one.number === number);
    if (byNumber !== undefined)
      throw new Refusal(`${way}.number`, `Channel ${number} is ${byNumber.label}: give a free number.`);
    const byRelay = others.find((one) => one.node === node && one.relay === relay);
    if (byRelay !== undefined)
      throw new Refusal(
        `${way}.relay`,
        `Relay ${relay} of node ${node} switches ${byRelay.label}: give a free one.`,
      );
    const key = keyOf(given, way);
    if (others.some((one) => one.key === key))
      throw new Refusal('key', `This house has a channel ${key} already: give another key.`);
  }
}

/** A channel's refusal at the field of the form that asks for it. */
async function createWay(
  holding: Holding,
  house: Place,
  given: Given,
  way: Way,
  now: Date,
): Promise<Channel> {
  try {
    return await createChannel(holding, house, channelOf(given, way), now);
  } catch (error) {
    if (error instanceof Refusal && error.path === 'relay') throw new Refusal(`${way}.relay`, error.message);
    throw error;
  }
}

/**
 * Two channels and the interlock between them, in the caller's transaction: where one is refused, none is there.
 * Not even frost breaks the interlock, since both ways at once short the motor's supply or burn its windings.
 * Common practice, no source.
 */
export async function createVent(
  holding: Holding,
  house: Place,
  given: Given,
  now: Date,
): Promise<ReversingVent> {
  const houseId = house.id;
  const node = (await houseNames(holding, houseId)).nodes.find(given.node, 'node');
  refuseTaken(given, node.key, await listChannels(holding, houseId));
  const open = await createWay(holding, house, given, 'open', now);
  const shut = await createWay(holding, house, given, 'shut', now);
  const interlock = await createInterlock(holding, houseId, {
    channel: open.key,
    kind: 'never-with',
    other: shut.key,
    delay: given.deadTime,
    frostMayBreak: false,
  });
  return { open, shut, interlock };
}
