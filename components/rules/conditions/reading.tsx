import { Phrases } from '@/components/ui/sentence';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Preferences } from '@/lib/units/preferences';
import { capitalFirst, conditionWords } from '@/lib/wording/rule-conditions';
import type { RuleNames } from '@/lib/wording/rule-names';
import { valueOfText, type FactOf } from './condition-text';
import { isGroup, treeOf, type DraftNode } from './draft-tree';
import { groupWords } from './group-modes';
import { factWords, readerOf, standingOf, type ClockFacts } from './present';
import { Verdict } from './verdict';

export interface ReadingFacts {
  now: readonly StatePoint[];
  clock: ClockFacts;
  names: RuleNames;
  factOf: FactOf;
  preferences: Preferences;
}

/** Conditions to be read, each with how it stands now. Made by the server: whoever only reads loads no script for it. */
export function Reading({ node, facts }: { node: DraftNode; facts: ReadingFacts }) {
  const { names, factOf, preferences } = facts;
  const read = readerOf(facts.now, facts.clock);
  const standing = standingOf(node, read, factOf, preferences);
  if (isGroup(node)) {
    return (
      <div>
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <p className="text-[0.95rem]">{groupWords(node)}</p>
          <Verdict standing={standing} />
        </div>
        <ul className="ml-1 flex flex-col gap-2 border-l border-line pt-2 pl-3">
          {node.nodes.map((one) => (
            <li key={one.id}>
              <Reading node={one} facts={facts} />
            </li>
          ))}
        </ul>
      </div>
    );
  }
  const tree = treeOf(node, (leaf) => {
    const typed = valueOfText(leaf, factOf, preferences);
    return 'value' in typed ? typed.value : undefined;
  });
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4">
      <p className="text-[0.95rem]">
        {tree === null ? null : <Phrases phrases={capitalFirst(conditionWords(tree, names, preferences))} />}
      </p>
      <Verdict standing={standing} now={factWords(node.fact, read(node.fact), factOf, preferences)} />
    </div>
  );
}
