/** How conditions stand at this moment: reckoned by control's own three-valued logic, from the house's live state. */
import { compileConditions, type FactValue, type Verdict } from '@/lib/control/conditions';
import type { StatePoint } from '@/lib/schema/house-state';
import { decimal, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { dayTime } from '@/lib/units/time';
import { dayName, monthName } from '@/lib/wording/rule-when';
import { treeOf, type DraftNode } from './draft-tree';
import { valueOfText, type FactOf } from './condition-text';

export type ClockFacts = Record<'time.hour' | 'time.month' | 'time.weekday', number> & {
  'time.sunUp': boolean | null;
};

/** Of a point its value now, null where no good reading says. */
export type FactReader = (fact: string) => FactValue | null;

/** A point counts only while its reading is good, as in control. */
export function readerOf(now: readonly StatePoint[], clock: ClockFacts): FactReader {
  return (fact) => {
    switch (fact) {
      case 'time.hour':
      case 'time.month':
      case 'time.weekday':
      case 'time.sunUp':
        return clock[fact];
      default: {
        const point = now.find((one) => one.key === fact);
        return point?.quality === 'good' ? point.value : null;
      }
    }
  };
}

/** 'unfinished' where something in it cannot be read yet, or there is nothing in it. */
export function standingOf(
  node: DraftNode,
  read: FactReader,
  factOf: FactOf,
  preferences: Preferences,
): Verdict | 'unfinished' {
  const gaps = new Set<string>();
  const tree = treeOf(node, (leaf) => {
    const typed = leaf.fact === '' ? { error: '' } : valueOfText(leaf, factOf, preferences);
    if ('error' in typed) gaps.add(leaf.id);
    return 'error' in typed ? undefined : typed.value;
  });
  if (gaps.size > 0 || tree === null) return 'unfinished';
  return compileConditions({ all: [tree] }).verdict(read);
}

/** @example "48.0 °C", "18:00 to 19:00", "down" */
export function factWords(
  fact: string,
  value: FactValue | null,
  factOf: FactOf,
  preferences: Preferences,
): string {
  const point = factOf(fact);
  if (value === null) return 'not known';
  if (typeof value === 'boolean') return value ? 'up' : 'down';
  if (point?.role === 'contact') return value === 1 ? 'on' : 'off';
  if (point !== undefined) return pointValue(value, point.unit, preferences);
  if (fact === 'time.month') return monthName(value);
  if (fact === 'time.weekday') return dayName(value);
  if (fact !== 'time.hour') return decimal(value, 0);
  const hour = (one: number) => dayTime(`${String(one % 24).padStart(2, '0')}:00`, preferences);
  return `${hour(value)} to ${hour(value + 1)}`;
}
