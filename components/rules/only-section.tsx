'use client';
import { useFieldArray, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { NumberField, Select } from '@/components/ui/field';
import { Phrases } from '@/components/ui/sentence';
import { holds } from '@/lib/control/conditions';
import type { Condition, ConditionTree } from '@/lib/control/rule-body';
import { fieldUnit, fieldValue } from '@/lib/units/fields';
import { decimal, pointValue } from '@/lib/units/format';
import { conditionWords, OPERATOR_WORDS } from '@/lib/wording/rule-conditions';
import { dayName, monthName } from '@/lib/wording/rule-when';
import { useFacts, useRuleForm } from './context';
import { quantityOf } from './form-values';
import { Section } from './section';

export type ClockFacts = Record<'time.hour' | 'time.month' | 'time.weekday', number> & {
  'time.sunUp': boolean | null;
};

const clockFacts: Record<string, string> = {
  'time.hour': 'Hour of the day',
  'time.month': 'Month',
  'time.weekday': 'Day of the week',
  'time.sunUp': 'Sun is up',
};
const operators = [
  'greaterThanInclusive',
  'greaterThan',
  'lessThanInclusive',
  'lessThan',
  'equal',
  'notEqual',
] as const;

/** What a condition goes by now, and whether it holds: not known is not met. */
function Truth({
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
    point === undefined
      ? (Reflect.get(clock, leaf.fact) ?? null)
      : state?.quality === 'good'
        ? state.value
        : null;
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

function Value({ place, fact }: { place: number; fact: string }) {
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

/** Extra conditions, all of which must hold; each with how it stands now. */
export function OnlySection({ kept, clock }: { kept: ConditionTree | null; clock: ClockFacts }) {
  const form = useRuleForm();
  const { points, names, preferences } = useFacts();
  const list = useFieldArray({ control: form.control, name: 'only' });
  const leaves = useWatch({ control: form.control, name: 'only' });
  if (kept !== null) {
    return (
      <Section title="Only while">
        <p>
          <Phrases phrases={conditionWords(kept, names, preferences)} />.
        </p>
        <p className="text-[0.9rem] text-soft">
          These conditions were written by a program and are more than this form shows. They stay as they are.
        </p>
      </Section>
    );
  }
  return (
    <Section title={list.fields.length > 1 ? 'Only while all of these hold' : 'Only while this holds'}>
      {list.fields.length === 0 ? (
        <p className="text-[0.9rem] text-soft">No condition: the band alone decides.</p>
      ) : null}
      {list.fields.map((one, place) => {
        const leaf = leaves[place] ?? one;
        return (
          <div key={one.id} className="border-t border-line pt-3">
            <div className="grid grid-cols-[1fr_auto] items-start gap-2 sm:grid-cols-[1.4fr_1fr_1fr_auto]">
              <Select
                label={`Condition ${place + 1}: what`}
                labelHidden
                className="col-span-2 sm:col-span-1"
                error={form.errorOf(`only.${place}.fact`)}
                {...form.register(`only.${place}.fact`, {
                  onChange: () =>
                    form.setValue(`only.${place}.value`, leaf.fact === 'time.sunUp' ? '' : leaf.value),
                })}
              >
                <option value="">Choose …</option>
                {points.map((point) => (
                  <option key={point.key} value={point.key}>
                    {point.name}
                  </option>
                ))}
                {Object.entries(clockFacts).map(([fact, words]) => (
                  <option key={fact} value={fact}>
                    {words}
                  </option>
                ))}
              </Select>
              <Select
                label={`Condition ${place + 1}: how`}
                labelHidden
                {...form.register(`only.${place}.operator`)}
              >
                {operators
                  .filter((operator) => leaf.fact !== 'time.sunUp' || operator === 'equal')
                  .map((operator) => (
                    <option key={operator} value={operator}>
                      {OPERATOR_WORDS[operator]}
                    </option>
                  ))}
              </Select>
              <Value place={place} fact={leaf.fact} />
              <Button kind="quiet" onClick={() => list.remove(place)}>
                <span>
                  Remove<span className="sr-only"> condition {place + 1}</span>
                </span>
              </Button>
            </div>
            <Truth leaf={leaf} clock={clock} />
          </div>
        );
      })}
      <Button
        kind="quiet"
        className="-ml-4 self-start"
        onClick={() => list.append({ fact: '', operator: 'greaterThanInclusive', value: '' })}
      >
        Add a condition
      </Button>
    </Section>
  );
}
