import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { addPersonCommand } from '@/db/queries/person-command';
import { readMemory } from '@/db/queries/running';
import type { Memory } from '@/lib/control/memory';
import { migrateMemory } from '@/lib/control/memory-versions';
import type { HandCommand } from '@/lib/schema/channel';
import type { Channel, House } from '@/lib/schema/yard-view';
import type { Caller } from './caller';
import { Problem } from './errors';

const HOUR_S = 3600;
const DEFAULT_S = { off: HOUR_S, on: HOUR_S / 2 };
const HEATER_ON_S = HOUR_S;
/** So the core cuts a vent that is opened in frost. */
const VENT_IN_FROST_S = HOUR_S / 2;

/**
 * Writes down a hand command. The limits that the body alone shows are 422; frost and lock-outs are states of the house
 * and so 409.
 * @returns the order's number and for how long it holds
 */
export async function orderByHand(
  holding: Holding,
  house: House,
  channel: Channel,
  given: z.output<typeof HandCommand>,
  act: { caller: Caller; now: Date },
): Promise<{ number: number; seconds: number }> {
  const seconds = given.seconds ?? DEFAULT_S[given.state];
  if (given.state === 'on' && given.holdInFrost !== undefined) {
    throw refuse('holdInFrost', 'Only off can be held in frost; on is left out of it.');
  }
  if (given.state === 'on' && channel.load.kind === 'heater' && seconds > HEATER_ON_S) {
    throw refuse('seconds', 'A heater runs by hand for an hour at most; give it again then.');
  }
  const memory = await memoryOf(holding, house.id);
  const own = memory.channels.find((row) => row.id === channel.id);
  if (own !== undefined && own.lockouts.length > 0)
    throw new Problem('conflict', { detail: 'This channel is locked out; remove the lock-out first.' });
  const holdInFrost = given.holdInFrost ?? false;
  if (given.state === 'off' && channel.frostHelp && memory.frost.on && !holdInFrost) {
    throw new Problem('conflict', {
      detail:
        'There is frost, and this channel helps against it: say that it is to stay off in frost (holdInFrost), or leave it on.',
    });
  }
  if (given.state === 'on' && channel.load.kind === 'heater' && (own?.pointDeadSince ?? null) !== null) {
    throw new Problem('conflict', {
      detail:
        'The sensor that this heater goes by tells nothing, and a heater never runs blind: mend the sensor first.',
    });
  }
  const isVentInFrost = given.state === 'on' && channel.load.kind === 'vent' && memory.frost.on;
  const holdsS = isVentInFrost ? Math.min(seconds, VENT_IN_FROST_S) : seconds;
  const number = await addPersonCommand(holding, house.id, {
    at: act.now,
    by: act.caller.by,
    body: { kind: 'hand', channel: channel.id, state: given.state, seconds, holdInFrost },
  });
  return { number, seconds: holdsS };
}

async function memoryOf(holding: Holding, houseId: string): Promise<Memory> {
  return migrateMemory((await readMemory(holding, houseId))?.memory);
}

function refuse(path: string, message: string): Problem {
  return new Problem('not-valid', { errors: [{ path, message }] });
}

/** Watch's one press: every channel of the house off for an hour, frost or not. */
export const ALL_OFF_S = HOUR_S;
