'use client';
import { Select } from '@/components/ui/field';
import type { Condition } from '@/lib/control/rule-body';
import { useFacts, useRuleForm } from '../context';
import { useActs } from './builder-context';
import { innerPath, isGroup, type DraftFact, type DraftNode } from './draft-tree';
import { beginning, CLOCK_FACTS, kindOf, operatorsOf } from './fact-kinds';
import { FactValue } from './fact-value';
import { NodeTools, ToolsButton } from './node-tools';
import { usePresent } from './use-present';
import { Verdict } from './verdict';

/** One condition: what it goes by, how it is compared, with what; beside it how it stands now. */
export function FactRow({ leaf, path, number }: { leaf: DraftFact; path: string; number: string }) {
  const acts = useActs();
  const { points, factOf } = useFacts();
  const { errorOf } = useRuleForm();
  const { standing, now } = usePresent()(leaf);
  const own = innerPath(leaf, path);
  const name = `Condition ${number}`;
  const kind = kindOf(leaf.fact, factOf(leaf.fact)?.role);
  const change = (what: Partial<Pick<DraftFact, 'fact' | 'operator' | 'value'>>) =>
    acts.change(leaf.id, (node: DraftNode) => (isGroup(node) ? node : { ...node, ...what }));
  const choose = (fact: string) => {
    const next = kindOf(fact, factOf(fact)?.role);
    const isSameUnit = next === kind && factOf(fact)?.unit === factOf(leaf.fact)?.unit;
    change({ fact, ...(isSameUnit || (leaf.fact === '' && next === 'number') ? {} : beginning(next)) });
  };
  const isMissing = leaf.fact !== '' && factOf(leaf.fact) === undefined && !(leaf.fact in CLOCK_FACTS);
  return (
    <div role="group" aria-label={name}>
      <div className="grid grid-cols-2 items-start gap-2">
        <Select
          label={`${name}: what it goes by`}
          labelHidden
          className="col-span-2"
          name={`${own}.fact`}
          data-part={acts.part(leaf.id, 'fact')}
          value={leaf.fact}
          error={errorOf(`${own}.fact`)}
          onChange={(event) => choose(event.target.value)}
        >
          <option value="">Choose …</option>
          {isMissing ? <option value={leaf.fact}>{leaf.fact} (no longer there)</option> : null}
          <optgroup label="Points">
            {points.map((point) => (
              <option key={point.key} value={point.key}>
                {point.name}
              </option>
            ))}
          </optgroup>
          <optgroup label="Time, by the clock of the house">
            {Object.entries(CLOCK_FACTS).map(([fact, words]) => (
              <option key={fact} value={fact}>
                {words}
              </option>
            ))}
          </optgroup>
        </Select>
        <Select
          label={`${name}: how`}
          labelHidden
          name={`${own}.operator`}
          value={leaf.operator}
          onChange={(event) => {
            const found = operatorsOf(kind, leaf.operator).find((one) => one.operator === event.target.value);
            if (found !== undefined) change({ operator: found.operator satisfies Condition['operator'] });
          }}
        >
          {operatorsOf(kind, leaf.operator).map(({ operator, words }) => (
            <option key={operator} value={operator}>
              {leaf.isNegated ? `not: ${words}` : words}
            </option>
          ))}
        </Select>
        <FactValue leaf={leaf} path={own} name={name} onValue={(value) => change({ value })} />
      </div>
      <div className="flex items-center justify-between gap-x-2">
        <Verdict standing={standing} now={now} />
        <ToolsButton node={leaf} name={name.toLowerCase()} />
      </div>
      <NodeTools node={leaf} name={name.toLowerCase()} />
    </div>
  );
}
