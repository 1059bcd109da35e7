import type { ReactNode } from 'react';
import type { StatePoint } from '@/lib/schema/house-state';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import type { RuleNames } from '@/lib/wording/rule-names';
import type { RetireFacts } from '@/lib/wording/rule-retire';
import type { DrawnNight } from './draw-night';
import type { ClockFacts } from './conditions/present';
import type { RuleForm } from './form-values';
import type { SourceFacts } from './rest-section';

/** All that the page of one rule is made of. */
export interface RuleEditorData {
  rule: RuleWithVersions;
  /** The rule's body as its form shows it. */
  values: RuleForm;
  points: Point[];
  pointStates: StatePoint[];
  names: RuleNames;
  channel: { key: string; label: string; isProved: boolean };
  source: SourceFacts | null;
  clock: ClockFacts;
  night: DrawnNight | null;
  zone: string;
  preferences: Preferences;
  mayWrite: boolean;
  house: string;
  retiring: RetireFacts;
}

/** Parts that only tell: made by the server, so that the page loads no script for them. */
export interface RuleEditorParts {
  notices: ReactNode;
  conditions: ReactNode;
  versions: ReactNode;
}
