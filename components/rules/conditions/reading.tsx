'use client';
import { Phrases } from '@/components/ui/sentence';
import type { ConditionNode } from '@/lib/control/rule-body';
import { capitalFirst, conditionWords } from '@/lib/wording/rule-conditions';
import { useFacts } from '../context';
import { valueOfText } from './condition-text';
import { isGroup, treeOf, type DraftNode } from './draft-tree';
import { groupWords } from './group-modes';
import { usePresent } from './use-present';
import { Verdict } from './verdict';

/** Conditions to be read, each with how it stands now; what edits them is loaded when it is asked for. */
export function Reading({ node }: { node: DraftNode }) {
  const { names, factOf, preferences } = useFacts();
  const present = usePresent();
  const { standing, now } = present(node);
  if (isGroup(node)) {
    return (
      <div>
        <div className="flex flex-wrap items-baseline justify-between gap-x-4">
          <p className="text-[0.95rem]">{groupWords(node)}</p>
          <Verdict standing={standing} />
        </div>
        <ul className="ml-1 flex flex-col gap-2 border-l border-line pl-3 pt-2">
          {node.nodes.map((one) => (
            <li key={one.id}>
              <Reading node={one} />
            </li>
          ))}
        </ul>
      </div>
    );
  }
  const tree: ConditionNode | null = treeOf(node, (leaf) => {
    const typed = valueOfText(leaf, factOf, preferences);
    return 'value' in typed ? typed.value : undefined;
  });
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4">
      <p className="text-[0.95rem]">
        {tree === null ? null : <Phrases phrases={capitalFirst(conditionWords(tree, names, preferences))} />}
      </p>
      <Verdict standing={standing} now={now} />
    </div>
  );
}
