'use client';
import { Button } from '@/components/ui/button';
import { useActs } from './builder-context';
import { isGroup, type DraftNode } from './draft-tree';
import type { Move } from './edit-tree';

const MOVES: { how: Move; words: string; ofGroups?: true }[] = [
  { how: 'up', words: 'Up' },
  { how: 'down', words: 'Down' },
  { how: 'in', words: 'Into the group' },
  { how: 'out', words: 'Out of the group' },
  { how: 'group', words: 'Put in a group' },
  { how: 'ungroup', words: 'Take the group apart', ofGroups: true },
];

/** Opens a node's tools below it; a list that opens over the page would lose the focus with the row that moves. */
export function ToolsButton({ node, name }: { node: DraftNode; name: string }) {
  const acts = useActs();
  return (
    <Button
      kind="quiet"
      className="-mr-3 shrink-0 px-3"
      data-part={acts.part(node.id, 'tools')}
      aria-expanded={acts.open === node.id}
      onClick={() => acts.toggle(node.id)}
    >
      <span>
        Move<span className="sr-only"> or remove {name}</span>
      </span>
    </Button>
  );
}

export function NodeTools({ node, name }: { node: DraftNode; name: string }) {
  const acts = useActs();
  if (acts.open !== node.id) return null;
  return (
    <div role="group" aria-label={`Move or remove ${name}`} className="mt-2 flex flex-wrap gap-2">
      {MOVES.filter((one) => one.ofGroups !== true || isGroup(node)).map(({ how, words }) => (
        <Button
          key={how}
          data-part={acts.part(node.id, how)}
          disabled={!acts.canMove(node.id, how)}
          onClick={() => acts.move(node.id, how)}
        >
          {words}
        </Button>
      ))}
      {isGroup(node) ? null : (
        <Button
          aria-pressed={node.isNegated}
          onClick={() => acts.change(node.id, (one) => ({ ...one, isNegated: !one.isNegated }))}
        >
          {node.isNegated ? 'Take the “not” away' : 'Put a “not” before it'}
        </Button>
      )}
      <Button onClick={() => acts.remove(node.id)}>Remove</Button>
    </div>
  );
}
