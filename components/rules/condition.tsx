'use client';
import { NumberField, Select } from '@/components/ui/field';
import { holds } from '@/lib/control/conditions';
import type { Condition } from '@/lib/control/rule-body';
import { fieldUnit, fieldValue } from '@/lib/units/fields';
import { decimal, pointValue } from '@/lib/units/format';
import { dayName, monthName } from '@/lib/wording/rule-when';
import { useFacts, useRuleForm } from './context';
import { quantityOf } from './form-values';

export type ClockFacts = Record<'time.hour' | 'time.month' | 'time.weekday', number> & {
  'time.sunUp': boolean | null;
};

function clockFact(clock: ClockFacts, fact: string): number | boolean | null {
  switch (fact) {
    case 'time.hour':
    case 'time.month':
    case 'time.weekday':
    case 'time.sunUp':
      return clock[fact];
    default:
      return null;
  }
}

/** What a condition goes by now, and whether it holds: not known is not met. */
export function Truth({
  leaf,
  clock,
}: {
  leaf: { fact: string; operator: Condition['operator']; value: string };
  clock: ClockFacts;
}) {
  const { now, points, preferences } = useFacts();
  if (leaf.fact === '') return null;
  const point = points.find((one) => one.key === leaf.fact);
  const state = now.find((one) => one.key === leaf.fact);
  const fact =
    point === undefined ? clockFact(clock, leaf.fact) : state?.quality === 'good' ? state.value : null;
  const typed =
    leaf.fact === 'time.sunUp'
      ? leaf.value === 'true'
      : fieldValue(leaf.value, quantityOf(point?.unit), preferences);
  if (typed === null) return null;
  if (fact === null) return <p className="text-[0.9rem] text-warn">not known now, so it does not hold</p>;
  const verdict = holds({ fact: leaf.fact, operator: leaf.operator, value: typed }, fact);
  const value =
    typeof fact === 'boolean'
      ? fact
        ? 'it is up'
        : 'it is down'
      : point !== undefined
        ? pointValue(fact, point.unit, preferences)
        : leaf.fact === 'time.month'
          ? monthName(fact)
          : leaf.fact === 'time.weekday'
            ? dayName(fact)
            : decimal(fact, 0);
  return (
    <p className="text-[0.9rem] text-soft">
      now <span className="font-mono">{value}</span>, {verdict === true ? 'holds' : 'does not hold'}
    </p>
  );
}

/** The field that fits what the condition is about. */
export function ConditionValue({ place, fact }: { place: number; fact: string }) {
  const form = useRuleForm();
  const { points, preferences } = useFacts();
  const name = `only.${place}.value` as const;
  const common = { label: 'value', labelHidden: true, error: form.errorOf(name), ...form.register(name) };
  if (fact === 'time.sunUp')
    return (
      <Select {...common}>
        <option value="true">yes</option>
        <option value="false">no</option>
      </Select>
    );
  if (fact === 'time.month' || fact === 'time.weekday') {
    const many = fact === 'time.month' ? 12 : 7;
    const word = fact === 'time.month' ? monthName : dayName;
    return (
      <Select {...common}>
        {Array.from({ length: many }, (_, index) => (
          <option key={index} value={String(index + 1)}>
            {word(index + 1)}
          </option>
        ))}
      </Select>
    );
  }
  const unit = points.find((one) => one.key === fact)?.unit;
  const shown = unit === undefined ? undefined : (fieldUnit(quantityOf(unit), preferences) ?? unit);
  return <NumberField {...common} {...(shown === undefined ? {} : { unit: shown })} />;
}
