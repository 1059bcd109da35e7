/** What each kind of alarm means, and what to do about it. The cautions of the trade stand where they matter. */
import { UNSTEADY_WORDS } from './quality';

interface Remedy {
  effect: string;
  remedy: string;
}

const REMEDIES: Record<string, Remedy> = {
  frost: {
    effect:
      'The house is near freezing. Loads marked to help run now, and rests are cut short where rules allow it.',
    remedy: 'Shut what is open, cover the crop, and turn a heater on.',
  },
  'point-silent': {
    effect: 'Rules that go by it use their stand-in; without one their loads fall to their safe state.',
    remedy: 'Look at the probe’s plug and for a chewed cable.',
  },
  'point-not-trusted': {
    effect: 'Its readings are kept but not used. Rules use their stand-in or their last good value.',
    remedy: 'Compare it with a thermometer; look for a wet plug or a loose screw.',
  },
  'point-unsteady': {
    effect: UNSTEADY_WORDS,
    remedy: 'Look for a loose plug, a chewed cable, or a radio that is only just reached.',
  },
  'node-lost': {
    effect:
      'Its relays have let go by themselves: each load stands in its safe state, or runs by the node’s own fallback.',
    remedy: 'Look at its supply and its network. Nothing can be commanded there until it is back.',
  },
  'control-not-running': {
    effect:
      'Nothing decides about relays. Within 30 s of the last command each load falls to its safe state.',
    remedy:
      'It is started again by itself. If this stays, restart the machine that runs it, and watch the house by hand.',
  },
  'core-under-floor': {
    effect: 'The heap is spared: no draw starts, not even for frost, but by hand.',
    remedy: 'Probe it and squeeze a handful first; feed or turn it on a mild day.',
  },
  'core-not-good': {
    effect: 'Draws go on, but nothing stops them if the heap is cooling down.',
    remedy: 'Look at the core probe and its cable.',
  },
  'frost-without-reading': {
    effect: 'Frost help goes on blind for 30 min, then it ends.',
    remedy: 'Go and look. Turn a heater on if the house is cold.',
  },
  'hand-off-in-frost': {
    effect: 'A load that would help against frost stands still because a person said so.',
    remedy: 'Give it back to auto unless somebody works at it.',
  },
  'hand-on-in-frost': {
    effect: 'A load that cools runs in frost, for 30 min at most.',
    remedy: 'Give it back to auto.',
  },
  'interlock-blocks-frost': {
    effect: 'The other load is on, or its relay does not say that it is off, so this one may not run.',
    remedy: 'Look whether the other is stuck open; shut it by hand.',
  },
  'high-limit': {
    effect: 'It may run again when the sensor has cooled by 1 °C.',
    remedy: 'Feel whether the bench is hot. Look for a sensor that lies on the heater.',
  },
  'no-gain': {
    effect: 'The draw was ended: electricity was used and the house was not warmed.',
    remedy:
      'Look for a blocked or leaking pipe, and at the heap beside it. Never open the loop into a house where people work.',
  },
  'daily-limit': {
    effect: 'It rests until some of its 24 h have passed. Frost may still draw on it where the rule allows.',
    remedy: 'Shut vents early, cover the crop, or let a heater help.',
  },
  'rest-ran-to-most': {
    effect:
      'It was drawn on again though it was colder than asked. If this goes on, the heap is wearing out.',
    remedy: 'Probe it. Lengthen the rest, shorten the draw, or feed it.',
  },
  'fan-standing': {
    effect: 'No heat comes, and it does not count as a draw.',
    remedy: 'Look at the fuse, the plug and the fan. Switch off at the isolator before you reach into it.',
  },
  'runs-though-off': {
    effect: 'It draws current though its relay says that it is off: it may warm or cool against every rule.',
    remedy: 'Use its isolator. A contact may be welded, or a switch beside the relay is on.',
  },
  'relay-does-not-follow': {
    effect: 'The load may run, or stand, against every rule.',
    remedy: 'Use its isolator. A contact may be welded: have the relay changed.',
  },
  'frozen-point-in-frost': {
    effect: 'It is still believed, for it may be true. If its neighbours stay warmer it will be dropped.',
    remedy: 'Look at the probe.',
  },
  'cloned-token': {
    effect: 'Whichever calls last is obeyed, and readings of both are mixed.',
    remedy: 'Give the node a new token under Wiring, and enter it in the one that is yours.',
  },
  'epoch-too-far': {
    effect: 'It ignores commands from here: a restored backup may have set this installation back.',
    remedy: 'Restart the worker once; if it stays, power the node off and on.',
  },
};

export function alarmRemedies(kind: string): Remedy {
  return (
    REMEDIES[kind] ?? { effect: 'Something wants looking at.', remedy: 'Look at the house and its wiring.' }
  );
}
