/** What comes next for a channel (Explanation.next): by the clock, by a reading, or by what somebody does. */
import type { Claim, State } from './types';

export type NextReason = NextThen | NextIf | NextWhen;

/** By the clock alone, if no reading changes. */
export interface NextThen {
  kind: 'then';
  at: number;
  state: State;
  claim: Claim;
}

/** If a point passes a value; nothing changes up to it. */
export interface NextIf {
  kind: 'if';
  /** null: the coldest house-air or bench point, which frost looks at; that it rises means that none is colder. */
  point: string | null;
  side: 'above' | 'below';
  value: number;
  /** The value itself is enough. */
  orAt?: true;
  /** And nothing but it: a reading that jumps over it brings nothing. */
  exactly?: true;
  /** When this then comes of it; absent: at once. */
  at?: number;
  /** That is later than by the clock alone. */
  later?: true;
  /** Equal to the present state: the channel keeps it where by the clock it would not, or the claim alone changes. */
  state: State;
  claim: Claim;
}

/** If something is done or reported. */
export interface NextWhen {
  kind: 'when';
  what: 'unlocked' | 'given-back' | 'other-off' | 'other-on' | 'ready' | 'answers';
  /** other-off, other-on: key of the other channel. */
  other?: string;
  /** ready: slug of the heap that somebody says is ready. */
  source?: string;
  /** answers: the point that is missing. */
  point?: string;
  at?: number;
  /** Absent where it hangs on what the point then reads. */
  state?: State;
  claim?: Claim;
}
