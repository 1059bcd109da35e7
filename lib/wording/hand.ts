/** What will happen when a person takes a load by hand, said before it happens. */
import { temperature } from '@/lib/units/format';
import { duration } from '@/lib/units/time';
import { begin, channelName, said, timeWords, type Scene } from './scene';
import { level } from './settings';

export interface HandAsk {
  channel: { key: string; loadKind: string; frostHelp: boolean };
  state: 'on' | 'off';
  seconds: number;
  holdInFrost: boolean;
  /** There is frost now. */
  inFrost: boolean;
  frostLimit: number | null;
  /** Its source's core, where that is under its floor. */
  coreUnderFloor: { value: number | null; floor: number } | null;
}

const TURNED: Record<string, { on: string; off: string }> = {
  motor: { on: 'runs', off: 'stands still' },
  vent: { on: 'opens', off: 'shuts' },
  valve: { on: 'opens', off: 'shuts' },
  heater: { on: 'heats', off: 'is off' },
};

/** @example "The gate-heap fan runs till 06:15, whatever its rule and its rest say; then it goes back to auto." */
export function handWords(ask: HandAsk, scene: Scene): string[] {
  const turned = TURNED[ask.channel.loadKind]?.[ask.state] ?? `is ${ask.state}`;
  const until = timeWords(scene.now + ask.seconds * 1000, scene) ?? '';
  const lines = [
    `${begin(channelName(ask.channel.key, scene))} ${turned} till ${until} (${duration(ask.seconds)}), whatever its rule and its rest say; then it goes back to auto.`,
  ];
  if (ask.state === 'on') {
    lines.push('Interlocks, limits and lock-outs still hold.');
    if (ask.coreUnderFloor !== null) {
      const { value, floor } = ask.coreUnderFloor;
      lines.push(
        `The heap’s core is at ${temperature(value, scene.preferences)}, under its floor of ${level(floor, scene.preferences)}: drawing on it now may cool it so far that it stops working.`,
      );
    }
  }
  if (ask.state === 'off' && ask.channel.frostHelp) lines.push(frostWords(ask, scene));
  return lines;
}

function frostWords(ask: HandAsk, scene: Scene): string {
  const limit =
    ask.frostLimit === null
      ? 'in frost'
      : `when the house falls under ${level(ask.frostLimit, scene.preferences)}`;
  if (!ask.holdInFrost) return `Frost ends this: ${limit} it helps again by itself.`;
  return said(
    ask.inFrost ? 'There is frost now, and it will not help.' : `It stays off even ${limit}.`,
    'You are woken by an alarm then.',
  );
}

/** Longest that a hand command may last, s, by what it does. */
export function longestHandS(loadKind: string, state: 'on' | 'off'): number {
  return state === 'on' && loadKind === 'heater' ? 3600 : 12 * 3600;
}

/** Choices of duration, s; the first is the usual one. */
export function handChoicesS(loadKind: string, state: 'on' | 'off'): number[] {
  const longest = longestHandS(loadKind, state);
  const usual = state === 'on' ? 1800 : 3600;
  return [usual, 900, 1800, 3600, 2 * 3600, 4 * 3600, 8 * 3600, 12 * 3600]
    .filter((one, place) => one <= longest && (place === 0 || one !== usual))
    .sort((one, other) => (one === usual ? -1 : other === usual ? 1 : one - other));
}
