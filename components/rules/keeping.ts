import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { Point } from '@/lib/schema/yard-view';
import type { RetireFacts } from '@/lib/wording/rule-retire';

export type Keeping = 'rename' | 'drop' | 'retire';

export interface KeepRuleProps {
  rule: RuleWithVersions;
  house: string;
  /** Of the rule's own house. */
  points: Point[];
  channel: { key: string; label: string };
  retiring: RetireFacts;
  /** Null where it went well, else why not. */
  onKeep: (method: 'PATCH' | 'POST' | 'DELETE', under: string, body?: object) => Promise<string | null>;
}
