/**
 * Coil, contact and load of a relay, each by its own name everywhere: an NC contact is closed while its coil is off. A node
 * tells of coils; contact and load follow from them, until something else has been seen.
 */
export type OnOff = 'on' | 'off';

export interface RelayStanding {
  contact: 'NO' | 'NC';
  /** The load's state that is ordered; null where nothing is decided yet. */
  wanted: OnOff | null;
  /** The load's state by what the node says of its coil; null where it has not said. */
  reported: OnOff | null;
  /** Kinds of alarms that stand about its channel. */
  alarms: readonly string[];
}

export interface RelayWords {
  coil: string;
  contact: string;
  load: string;
  /** Whether the contact lets current through, as far as is known. */
  isClosed: boolean | null;
  /** What is not as it was ordered; null where all is. */
  fault: string | null;
  /** Ordered and not yet reported; null where both agree or nothing is known. */
  wanted: string | null;
}

const turned = (state: OnOff): OnOff => (state === 'on' ? 'off' : 'on');

/** The coil behind a load's state. @example coilOf('NC', 'on') === 'off' */
export const coilOf = (contact: 'NO' | 'NC', load: OnOff): OnOff => (contact === 'NO' ? load : turned(load));

const FAULTS: Record<string, string> = {
  'runs-though-off': 'Its load has current though the coil says off: the contact may be welded.',
  'fan-standing': 'Its load has no current though the coil says on: the contact, the fuse or the load.',
  'relay-does-not-follow': 'It was told otherwise, and does not follow.',
};

/** @example relayWords({contact: 'NC', wanted: 'on', reported: 'on', alarms: []}) is "coil off", "contact closed", "load on" */
export function relayWords({ contact, wanted, reported, alarms }: RelayStanding): RelayWords {
  const kind = Object.keys(FAULTS).find((one) => alarms.includes(one));
  const fault = kind === undefined ? null : (FAULTS[kind] ?? null);
  if (reported === null) {
    return {
      coil: 'coil not told',
      contact: 'contact not known',
      load: 'load not known',
      isClosed: null,
      fault,
      wanted: null,
    };
  }
  const seen = seenLoad(kind, reported);
  return {
    coil: `coil ${coilOf(contact, reported)}`,
    contact: seen.isClosed === null ? 'contact in doubt' : `contact ${seen.isClosed ? 'closed' : 'open'}`,
    load: seen.load,
    isClosed: seen.isClosed,
    fault,
    wanted: wanted === null || wanted === reported ? null : `ordered: load ${wanted}`,
  };
}

/** What the run proof has seen stands over what follows from the coil. */
function seenLoad(kind: string | undefined, reported: OnOff): { load: string; isClosed: boolean | null } {
  if (kind === 'runs-though-off') return { load: 'load has current', isClosed: true };
  if (kind === 'fan-standing') return { load: 'load has no current', isClosed: null };
  return { load: `load ${reported}`, isClosed: reported === 'on' };
}
