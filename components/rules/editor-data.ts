import type { StatePoint } from '@/lib/schema/house-state';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import type { RetireFacts } from '@/lib/wording/rule-retire';
import type { DrawnNight } from './band-night';
import type { ClockFacts } from './conditions/present';
import type { SourceFacts } from './rest-section';

/** All that the page of one rule is made of. */
export interface RuleEditorData {
  rule: RuleWithVersions;
  points: Point[];
  pointStates: StatePoint[];
  names: RuleNames;
  channel: { key: string; label: string; isProved: boolean };
  source: SourceFacts | null;
  clock: ClockFacts;
  night: DrawnNight | null;
  zone: string;
  now: number;
  preferences: Preferences;
  mayWrite: boolean;
  house: string;
  retiring: RetireFacts;
}
