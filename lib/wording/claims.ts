/** The claims of the ladder in the reader's words. The exact term stands behind each, on a press. */
import type { Claim } from '@/lib/control/types';

/** Inside a sentence: "then a rest turns it off". */
export const CLAIM_NAMES: Record<Claim, string> = {
  'lock-out': 'the lock-out',
  interlock: 'an interlock',
  limit: 'its limit',
  proving: 'the proving run',
  'short-cycle': 'its least time',
  hand: 'a hand',
  'source-guard': 'the guard of its source',
  frost: 'frost',
  'fail-safe': 'its missing sensor',
  rest: 'a rest',
  band: 'the band',
  idle: 'the lack of any reason',
};

/** As the name of a line in the ladder. */
export const CLAIM_TITLES: Record<Claim, string> = {
  'lock-out': 'Lock-out',
  interlock: 'Interlock',
  limit: 'Limit',
  proving: 'Proving',
  'short-cycle': 'Least on or off time',
  hand: 'By hand',
  'source-guard': 'Guard of the source',
  frost: 'Frost',
  'fail-safe': 'Sensor missing',
  rest: 'Rest',
  band: 'Band',
  idle: 'Nothing else',
};

/** What a claim that does not speak says about things. */
export const CLAIM_SILENT: Record<Claim, string> = {
  'lock-out': 'Nobody has locked it out.',
  interlock: 'No other channel stands in its way.',
  limit: 'No limit is passed.',
  proving: 'Nobody is proving it.',
  'short-cycle': 'No least time holds it.',
  hand: 'Nobody has taken it by hand.',
  'source-guard': 'Its source may be drawn on.',
  frost: 'The house is not in frost.',
  'fail-safe': 'Its sensors answer.',
  rest: 'No rest is due.',
  band: 'Its band does not want it.',
  idle: '',
};
