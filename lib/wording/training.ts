/** Faults for training in words: what goes wrong, and what should be seen of it, and where. */
import type { Phrase } from './phrase';

export interface FaultWords {
  name: string;
  /** What is done in the yard. */
  what: string;
  /** What should be seen, the first first. */
  seen: string[];
}

export const TRAINING_INTRO =
  'This house is driven by the simulated yard, so you may break it: nothing real moves. Switch a fault on, watch what the screens say, and find it. Each ends by itself.';

export const FAULT_WORDS: Record<string, FaultWords> = {
  'dead-sensor': {
    name: 'A dead sensor',
    what: 'The probe sends nothing more, as with a chewed cable.',
    seen: [
      'After three reports the point is silent, and an alarm says so.',
      'A rule that goes by it takes its stand-in; without one its load falls to its safe state.',
    ],
  },
  'lying-85': {
    name: 'A probe that says 85.0 °C',
    what: 'The probe says what a one-wire probe says that has only just got power.',
    seen: [
      'The reading is stored and not used: the point is not trusted, and an alarm says why.',
      'No load is switched by it.',
    ],
  },
  'swapped-probes': {
    name: 'Two probes swapped',
    what: 'Each sends under the other’s name, as after two plugs were changed.',
    seen: [
      'No alarm: both figures are plausible. Both points jump at one moment.',
      'Hold the one in your hand (in the yard: compare both with their neighbours): the other one rises.',
    ],
  },
  'welded-relay': {
    name: 'A welded contact',
    what: 'The load runs on, whatever its coil does.',
    seen: [
      'With the coil off, its run proof still shows current: after 30 s and one report the alarm “runs though off” stands.',
      'The relay board says: coil off, contact closed, load has current. A channel without a run proof shows nothing of it.',
    ],
  },
  'dead-fan': {
    name: 'A dead fan',
    what: 'The coil is on and the load stands: a fuse, a plug, or the fan.',
    seen: [
      'With the coil on, its run proof shows no current: the alarm “ordered on and stands” stands, and it counts as no draw.',
      'The loop’s return does not rise. A channel without a run proof shows nothing but that.',
    ],
  },
  'loop-leak': {
    name: 'A leak in the heap’s loop',
    what: 'The pipe has come apart outdoors: most of what comes back is cold air.',
    seen: [
      'The loop’s return falls while the fan runs.',
      'A rule with a least gain ends the draw once its time is over, and an alarm says that it brings nothing.',
    ],
  },
  'lost-link': {
    name: 'A lost line',
    what: 'The node runs and measures, and nobody hears it.',
    seen: [
      'Within 30 s every coil drops, or runs by the node’s own fallback. One minute after its points are silent the node is an alarm.',
      'When the line is back, the readings of the time between come, the newest first; the lease trip is counted.',
    ],
  },
  'power-cut': {
    name: 'A power cut at the panel',
    what: 'The node is dark: no coil, no reading.',
    seen: [
      'Every load falls to its safe state at once, and later the node is an alarm.',
      'When it is back it has another boot, one restart more, and every coil off until it is commanded.',
    ],
  },
};

/** @example faultSentence({fault: 'swapped-probes', point: 'bench-1', other: 'bench-2', channel: null}, 'LH-1') */
export function faultAbout(fault: {
  fault: string;
  point: string | null;
  other: string | null;
  channel: number | null;
}): Phrase[] {
  const name: Phrase = { text: FAULT_WORDS[fault.fault]?.name ?? fault.fault, tone: 'strong' };
  if (fault.point !== null && fault.other !== null) return [name, `: ${fault.point} and ${fault.other}`];
  if (fault.point !== null) return [name, `: ${fault.point}`];
  return fault.channel === null ? [name] : [name, `: channel ${fault.channel}`];
}
