'use client';
import { useFieldArray, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/field';
import { Phrases } from '@/components/ui/sentence';
import type { ConditionTree } from '@/lib/control/rule-body';
import { conditionWords, OPERATOR_WORDS } from '@/lib/wording/rule-conditions';
import { ConditionValue, Truth, type ClockFacts } from './condition';
import { useFacts, useRuleForm } from './context';
import { Section } from './section';

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
              <ConditionValue place={place} fact={leaf.fact} />
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
