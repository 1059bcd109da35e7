import type { Section } from '@/lib/analysis/probe-section';
import type { ProbeSet } from '@/lib/schema/probe-set';
import type { Preferences } from '@/lib/units/preferences';

export interface RoundTarget {
  house: string;
  heap: string;
  zone: string;
  owner: string;
  /** Of the last round: the same places again. */
  section: Section | null;
  preferences: Preferences;
  /** The one that is amended; left out, a new one is written. */
  round?: ProbeSet;
}

/** Of whose rounds each can be amended. */
export type RoundsToAmend = Omit<RoundTarget, 'zone' | 'section' | 'preferences' | 'round'>;
