/** A proof of a channel in words: what each step asks, why, why one is not needed, and what was found. */
import type { NotNeeded, ProofStep, RunKind } from '@/lib/analysis/proof';
import { change, decimal, difference, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { capital, counted, countWord } from './counts';
import { join } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface ProvenLoad {
  /** load.kind */
  kind: string;
  contact: 'NO' | 'NC';
  /** It drives air through a heap's pipe. */
  isHeapFan: boolean;
}

const space = '\u00a0';

export const STEP_TITLES: Record<ProofStep, string> = {
  dead: 'Isolator off and locked, circuit dead at the board',
  rating: 'Load within the contact’s rating',
  photographs: 'Rating plate and wiring photographed',
  clear: 'People clear, isolator on',
  run: 'Run from here, ends by itself',
  seen: 'Seen to move the right way',
  current: 'Shown to run by its own sensor',
  gain: 'What a draw brings',
  unplugged: 'Falls to its safe state when the node is unplugged',
  fallback: 'Fallback tried',
  'last-resort': 'Thermostat of last resort seen to come on',
};

const WHY: Record<ProofStep, string> = {
  dead: 'A tester that has died calls every circuit dead. So it is proved on a live source before and after. Whoever works at mains has the licence that local code asks for.',
  rating:
    'A contact that carries too much welds shut, and a welded contact is a load that nothing here can stop.',
  photographs:
    'At the next fault somebody stands here who has not seen this panel. What a phone writes into a picture, place and all, is taken out.',
  clear: 'The load starts from a screen. Look at it yourself, call out, and only then go on.',
  run: 'Stand where you can see the load. It stops by itself, even if this page or the network goes.',
  seen: 'A wire on the wrong terminal runs another load, or this one backwards.',
  current:
    'What shows that the load runs must show it now, or every later alarm about a standing fan means nothing.',
  gain: 'Air that moves is not yet heat. A run of some minutes shows what comes back warmer.',
  unplugged:
    'All safety here hangs on this: with nobody to command it, the node drops its coils within its lease of 30\u00a0s. Pull the node’s network, leave it off for a minute, and put it back.',
  fallback:
    'With its network off the node keeps the house by its own small thermostat. Cool its probe (ice in a bag) until it starts, and warm it in the hand until it stops.',
  'last-resort':
    'When everything here is dead, this is what keeps the frost out. Turn it up or cool its sensor until it comes on, read the temperature, and set it back.',
};

/** Why a step is there, as far as it hangs on the load. */
export function whyWords(step: ProofStep, load: ProvenLoad): string {
  if (step === 'seen' && load.isHeapFan)
    return 'The fan blows INTO the heap’s pipe and never sucks from it, so that a leak goes outwards. Hold a strip of paper at the pipe’s intake in the house: it is drawn in, and warm air comes back at the return. A wire on the wrong terminal runs another load.';
  if (step === 'unplugged' && load.contact === 'NC')
    return 'This contact is normally closed: unplugged, the load RUNS. Pull the node’s network while the load stands, leave it off for a minute, and see that the load starts.';
  return WHY[step];
}

const NOT_NEEDED: Record<NotNeeded, string> = {
  'no-run-proof': 'No sensor shows that this load runs; your eyes do, in the step before.',
  'no-loop': 'No loop with both ends measured hangs on this channel, so there is no gain to tell.',
  'no-fallback': 'This channel has no fallback: without the server its load falls to its safe state.',
  'node-cannot': 'Its node cannot run fallbacks, so the one that is set here never runs.',
  'no-frost-limit': 'This house has no frost limit.',
  'does-not-warm': 'This load does not keep the frost out.',
  'seen-lately': 'Somebody saw it come on within the year; the date stands with the house.',
};
export const notNeededWords = (because: string): string =>
  Object.hasOwn(NOT_NEEDED, because) ? NOT_NEEDED[because as NotNeeded] : because;

/** @example firstWords('dead') === 'First: isolator off and locked, circuit dead at the board.' */
export function firstWords(step: ProofStep): string {
  const title = STEP_TITLES[step];
  return `First: ${title.charAt(0).toLowerCase()}${title.slice(1)}.`;
}

export const RUN_WORDS: Record<RunKind, string> = {
  pulse: 'Run',
  gain: 'Gain run',
  unplug: 'Run for unplugging',
};

export interface StepRecord {
  step: ProofStep;
  result: 'done' | 'failed' | 'without' | 'not-needed';
  note: string | null;
  figures: Record<string, number | string | boolean | null>;
}

/** What was found in a step, from the figures kept with it; null where the step has none. */
export function foundWords({ step, result, figures }: StepRecord, preferences: Preferences): string | null {
  const number = (key: string) => (typeof figures[key] === 'number' ? figures[key] : null);
  const text = (key: string) => (typeof figures[key] === 'string' ? figures[key] : null);
  switch (step) {
    case 'rating':
      return text('words');
    case 'run': {
      const seconds = number('ranS');
      return seconds === null ? null : `The relay reported it on for ${duration(seconds)}.`;
    }
    case 'seen':
      if (result !== 'failed') return null;
      return figures['saw'] === 'nothing' ? 'Nothing moved.' : 'It moved the wrong way.';
    case 'current': {
      const [greatest, above, unit] = [number('greatest'), number('above'), text('unit')];
      if (greatest === null || above === null || unit === null) return null;
      return `${text('point') ?? ''} showed ${pointValue(greatest, unit, preferences)}, over ${pointValue(above, unit, preferences)}.`;
    }
    case 'gain': {
      const gain = gainWords(number('kelvin'), number('sd'), number('ranS'), preferences);
      return gain === null ? null : `${gain.charAt(0).toUpperCase()}${gain.slice(1)}.`;
    }
    case 'unplugged':
      return fellWords(text('how'), number('awayS'));
    case 'last-resort': {
      const [below, cameOnAt] = [number('below'), number('cameOnAt')];
      if (below === null || cameOnAt === null) return null;
      return `Set to ${pointValue(below, 'Cel', preferences)}; it came on at ${pointValue(cameOnAt, 'Cel', preferences)}.`;
    }
    default:
      return null;
  }
}

/** @example gainWords(6.2, 0.4, 300, USUAL) === 'return +6.2 ± 0.4 °C in 5 min' */
export function gainWords(
  kelvin: number | null,
  sd: number | null,
  seconds: number | null,
  preferences: Preferences,
): string | null {
  if (kelvin === null || seconds === null) return null;
  const figure = change(kelvin, preferences).split(space)[0] ?? '';
  const [give = '', unit = ''] = difference(sd, preferences).split(space);
  const plain = change(kelvin, preferences);
  return `return ${sd === null ? plain : `${figure}${space}±${space}${give}${space}${unit}`} in ${duration(seconds)}`;
}

/** How the coil was let go, by the node's own account. */
export function fellWords(how: string | null, awayS: number | null): string | null {
  if (how === 'lease')
    return awayS === null
      ? 'The node counted a lease that ended: it dropped the coil by itself.'
      : `The node went ${duration(awayS)} without a command and counted a lease that ended in it: it dropped the coil by itself.`;
  if (how === 'restart') return 'The node lost its power too, and came back with the coil off.';
  return how === 'seen' ? 'Seen by whoever stood there; this board keeps no count of its own.' : null;
}

/**
 * A count-down: seconds that are left, upwards, and never more than were ordered: a phone whose page was made a moment
 * before the order would begin a run of 60 s at 61.
 * @example leftWords(9400, 10) === '10'
 */
export const leftWords = (ms: number, ofS: number): string =>
  decimal(Math.min(ofS, Math.max(0, Math.ceil(ms / 1000))), 0);

const PARTS: Record<string, string> = {
  node: 'its node',
  relay: 'its relay',
  contact: 'its contact',
  load: 'its load',
  contactor: 'its contactor',
  highLimit: 'its high limit',
  runProof: 'its proof of running',
  fallback: 'its fallback',
};

/** What a change of wiring does to a proof; null where it does nothing. `parts` as `changedWiring` gives them. */
export function unprovesWords(parts: readonly string[]): string | null {
  if (parts.length === 0) return null;
  const named = parts.map((part) => PARTS[part] ?? part);
  const last = named.pop() ?? '';
  const all = named.length === 0 ? last : `${named.join(', ')} and ${last}`;
  return `This changes ${all}. The channel then counts as not proved: it has to be proved again, and a proof that goes on ends.`;
}

export interface ProvingStanding {
  channel: { number: number; label: string };
  /** Steps that are needed, and of them those that are settled; null: no proof goes on. */
  steps: { needed: number; settled: number } | null;
  /** Epoch ms; null: it counts as not proved. */
  provedAt: number | null;
  lockedOut: boolean;
}

/** @example "Proving channel 4, the ridge vent. Three of nine steps are done." */
export function provingSentence(standing: ProvingStanding, provedOn: string | null): Phrase[] {
  const { channel, steps, lockedOut } = standing;
  const name = `channel ${channel.number}, the ${midSentence(channel.label)}`;
  const locked: Phrase[] = lockedOut
    ? [' ', { text: 'It is locked out, so nothing runs it from here.', tone: 'warn' }]
    : [];
  if (steps !== null) {
    const done = `${capital(steps.settled === 0 ? 'none' : countWord(steps.settled))} of ${counted(steps.needed, 'step')} ${steps.settled === 1 ? 'is' : 'are'} done.`;
    return join(`Proving ${name}. `, { text: done, tone: 'strong' }, locked);
  }
  return join(
    capital(name),
    ' ',
    provedOn === null
      ? { text: 'has been wired but never proved.', tone: 'warn' }
      : { text: `was proved on ${provedOn}.`, tone: 'strong' },
    locked,
  );
}
