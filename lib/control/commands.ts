/** What people ordered. Each number is taken once, in order; what cannot be obeyed is refused with its reason. */
import { settleFrost } from './claims/frost';
import { endHand } from './claims/hand';
import { settleDerived } from './derived';
import { settlePoints } from './quality';
import { entry, type Run } from './run';
import type { HandMemory } from './memory';
import type { PersonCommand } from './types';

const LONGEST_HAND_S = 43_200;
const LONGEST_HEATER_S = 3600;
const LONGEST_PULSE_S = 60;
const LONGEST_GAIN_RUN_S = 600;
/** On of a cooling channel that is given during frost. */
const LONGEST_IN_FROST_S = 1800;

/** Takes the commands above `taken` and gives the greatest number. */
export function takeCommands(run: Run, taken: number): number {
  const { commands } = run.observed;
  if (!commands.some(({ number }) => number > taken)) return taken;
  // what may be ordered hangs on frost, which the readings of this very step can begin
  settlePoints(run);
  settleDerived(run);
  settleFrost(run);
  let last = taken;
  for (const command of commands.toSorted((a, b) => a.number - b.number)) {
    if (command.number <= last) continue;
    last = command.number;
    take(run, command);
  }
  return last;
}

function take(run: Run, command: PersonCommand): void {
  if (command.kind === 'ready' || command.kind === 'rebuilt') {
    const index = run.plan.sources.findIndex(
      (one) => one.id === command.source || one.slug === command.source,
    );
    if (index < 0) return refuse(run, command, null, 'no-such-source');
    run.sources[index] = { ...entry(run.sources, index), ready: command.kind === 'ready', aboveSince: null };
    return;
  }
  if (command.kind === 'all-off') {
    const { seconds } = command;
    if (!isHandTime(seconds)) return refuse(run, command, null, 'hand-too-long');
    run.plan.channels.forEach((_, channel) => {
      giveHand(run, channel, command, { state: 'off', seconds, holdInFrost: true });
    });
    return;
  }
  const channel = run.plan.channels.findIndex(
    (one) => one.id === command.channel || one.key === command.channel,
  );
  if (channel < 0) return refuse(run, command, null, 'no-such-channel');
  switch (command.kind) {
    case 'hand':
      return takeHand(run, channel, command);
    case 'auto':
      return endHand(run, channel, 'auto');
    case 'lock-out':
      return takeLockOut(run, channel, command);
    case 'unlock':
      return takeUnlock(run, channel, command);
    case 'prove':
      return takeProve(run, channel, command);
    case 'prove-end':
      return endProve(run, channel);
  }
}

function refuse(run: Run, { number }: PersonCommand, channel: number | null, why: string): void {
  const id = channel === null ? null : entry(run.plan.channels, channel).id;
  run.events.push({ kind: 'command-refused', at: run.at, number, channel: id, why });
}

type Given<K extends PersonCommand['kind']> = Extract<PersonCommand, { kind: K }>;

/** Whether a hand of any load may be given for so long; what is no number is no time either. */
const isHandTime = (seconds: number): boolean => seconds > 0 && seconds <= LONGEST_HAND_S;

function takeHand(run: Run, channel: number, command: Given<'hand'>): void {
  const { config, inFrost } = entry(run.plan.channels, channel);
  const { pointDeadSince, lockouts } = entry(run.channels, channel);
  const { state, seconds, holdInFrost } = command;
  if (!isHandTime(seconds)) return refuse(run, command, channel, 'hand-too-long');
  if (state === 'on' && lockouts.length > 0) return refuse(run, command, channel, 'locked-out');
  if (state === 'on' && config.loadKind === 'heater') {
    if (seconds > LONGEST_HEATER_S) return refuse(run, command, channel, 'heater-hand-too-long');
    if (pointDeadSince !== null) return refuse(run, command, channel, 'heater-point-dead');
  }
  if (state === 'off' && inFrost === 'helps' && run.frost.on && !holdInFrost)
    return refuse(run, command, channel, 'frost-needs-hold');
  giveHand(run, channel, command, { state, seconds, holdInFrost });
}

function giveHand(
  run: Run,
  channel: number,
  { number, by, at }: PersonCommand,
  hand: { state: HandMemory['state']; seconds: number; holdInFrost: boolean },
): void {
  const { state, seconds, holdInFrost } = hand;
  const memory = entry(run.channels, channel);
  // a command that waited for a worker has used up its time meanwhile
  const givenAt = Math.min(at, run.at);
  const shortInFrost =
    state === 'on' && run.frost.on && entry(run.plan.channels, channel).inFrost === 'cools';
  const until = givenAt + (shortInFrost ? Math.min(seconds, LONGEST_IN_FROST_S) : seconds) * 1000;
  run.channels[channel] = { ...memory, hand: { state, by, number, givenAt, until, holdInFrost } };
  run.events.push({
    kind: 'hand-begun',
    at: run.at,
    channel: memory.id,
    why: { state, by, until, holdInFrost },
  });
}

function takeLockOut(run: Run, channel: number, command: Given<'lock-out'>): void {
  const memory = entry(run.channels, channel);
  // coil off would run the load: its isolator is what makes it dead
  if (entry(run.plan.channels, channel).safe === 'on') return refuse(run, command, channel, 'lock-out-on-nc');
  const { lockout: id, why, by, at: placedAt } = command;
  if (memory.lockouts.some((one) => one.id === id)) return;
  run.channels[channel] = { ...memory, lockouts: [...memory.lockouts, { id, why, by, placedAt }] };
  run.events.push({ kind: 'lock-out-begun', at: run.at, channel: memory.id, why: { lockout: id, why, by } });
}

function takeUnlock(run: Run, channel: number, command: Given<'unlock'>): void {
  const memory = entry(run.channels, channel);
  const lockouts = memory.lockouts.filter((one) => one.id !== command.lockout);
  if (lockouts.length === memory.lockouts.length) return;
  run.channels[channel] = { ...memory, lockouts };
  const why = { lockout: command.lockout, by: command.by };
  run.events.push({ kind: 'lock-out-ended', at: run.at, channel: memory.id, why });
}

function takeProve(run: Run, channel: number, command: Given<'prove'>): void {
  const { source } = entry(run.plan.channels, channel);
  const memory = entry(run.channels, channel);
  const longest = source === null ? LONGEST_PULSE_S : LONGEST_GAIN_RUN_S;
  if (!(command.seconds > 0 && command.seconds <= longest))
    return refuse(run, command, channel, 'pulse-too-long');
  if (memory.lockouts.length > 0) return refuse(run, command, channel, 'locked-out');
  // a pulse on a running load would change nothing and prove nothing
  if (memory.counted === 'on') return refuse(run, command, channel, 'already-running');
  const until = Math.min(command.at, run.at) + command.seconds * 1000;
  if (until <= run.at) return refuse(run, command, channel, 'too-late');
  run.channels[channel] = { ...memory, prove: { by: command.by, seconds: command.seconds, until } };
}

/** Whoever watches the run says stop. It ends as it would by itself, now. */
function endProve(run: Run, channel: number): void {
  const memory = entry(run.channels, channel);
  if (memory.prove === null) return;
  run.channels[channel] = {
    ...memory,
    prove: { ...memory.prove, until: Math.min(memory.prove.until, run.at) },
  };
}
