'use client';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';
import { Select } from '@/components/ui/field';
import { useRuleForm } from '../context';
import { useActs } from './builder-context';
import { innerPath, isGroup, type DraftGroup } from './draft-tree';
import { FactRow } from './fact-row';
import { isModeName, MODES, modeName } from './group-modes';
import { NodeTools, ToolsButton } from './node-tools';
import { usePresent } from './use-present';
import { Verdict } from './verdict';

/** A group: how many of its parts must hold, the parts, and what can be added. The outermost has no number. */
export function GroupBox({ group, path, number }: { group: DraftGroup; path: string; number: string }) {
  const acts = useActs();
  const { errorOf } = useRuleForm();
  const { standing } = usePresent()(group);
  const isRoot = number === '';
  const name = isRoot ? 'All conditions' : `Group ${number}`;
  const own = innerPath(group, path);
  const error = isRoot ? errorOf('only') : undefined;
  return (
    <div role="group" aria-label={name} className={classes(!isRoot && 'rounded-md border border-line p-3')}>
      {group.nodes.length === 0 ? null : (
        <div className="flex items-start gap-x-2">
          <Select
            label={`${name}: how many must hold`}
            labelHidden
            className="min-w-0 flex-1"
            value={modeName(group)}
            error={error}
            onChange={(event) => {
              const chosen = event.target.value;
              if (!isModeName(chosen)) return;
              const { mode, isNegated } = MODES[chosen];
              acts.change(group.id, (node) => (isGroup(node) ? { ...node, mode, isNegated } : node));
            }}
          >
            {Object.entries(MODES).map(([mode, { words }]) => (
              <option key={mode} value={mode}>
                {words}
              </option>
            ))}
          </Select>
          {isRoot ? null : <ToolsButton node={group} name={name.toLowerCase()} />}
        </div>
      )}
      {isRoot ? null : <NodeTools node={group} name={name.toLowerCase()} />}
      {group.nodes.length === 0 ? null : (
        <div className="mt-1">
          <Verdict standing={standing} />
        </div>
      )}
      <ul className="mt-3 flex flex-col gap-4">
        {group.nodes.map((node, place) => {
          const inner = `${own}.${group.mode}.${place}`;
          const place1 = isRoot ? String(place + 1) : `${number}.${place + 1}`;
          return (
            <li key={node.id} className="border-t border-line pt-3 first:border-0 first:pt-0">
              {isGroup(node) ? (
                <GroupBox group={node} path={inner} number={place1} />
              ) : (
                <FactRow leaf={node} path={inner} number={place1} />
              )}
            </li>
          );
        })}
      </ul>
      <div className="mt-2 flex flex-wrap gap-2">
        <Button
          kind="quiet"
          className="-ml-4"
          data-part={acts.part(group.id, 'add')}
          onClick={() => acts.addFact(group.id)}
        >
          <span>
            Add a condition
            {isRoot ? null : <span className="sr-only"> to {name.toLowerCase()}</span>}
          </span>
        </Button>
        {group.nodes.length === 0 ? null : (
          <Button kind="quiet" onClick={() => acts.addGroup(group.id)}>
            <span>
              Add a group
              {isRoot ? null : <span className="sr-only"> to {name.toLowerCase()}</span>}
            </span>
          </Button>
        )}
      </div>
    </div>
  );
}
