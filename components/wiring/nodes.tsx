import { CardTable } from '@/components/ui/card-table';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import type { FieldNode } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { AddButton } from './editing';
import { NodeNames } from './node-names';
import { NODE_COLUMNS, NodeRow } from './node-row';

/** Field nodes: when each was last heard, how it is, and what it sends that nobody has named yet. */
export function Nodes({
  nodes,
  kept,
  pointKeys,
  houseId,
  zone,
  now,
  preferences,
}: {
  nodes: FieldNode[];
  kept: Record<string, Record<string, unknown>>;
  /** Keys of all points of the house. */
  pointKeys: readonly string[];
  houseId: string;
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  return (
    <Panel title="Field nodes" actions={<AddButton kind="node" label="Register a node…" />}>
      {nodes.length === 0 ? (
        <Empty
          title="No field node yet."
          action={<AddButton kind="node" label="Register the first node…" primary />}
        >
          A node is the box in the field that reads the sensors and moves the relays. Registering it gives the
          token that it speaks with.
        </Empty>
      ) : (
        <>
          <CardTable caption="Field nodes" columns={NODE_COLUMNS}>
            {nodes.map((node) => (
              <NodeRow key={node.id} kept={kept[node.id]} {...{ node, houseId, zone, now, preferences }} />
            ))}
          </CardTable>
          {nodes.map((node) => (
            <NodeNames key={node.id} node={node.key} kept={kept[node.id]} pointKeys={pointKeys} />
          ))}
        </>
      )}
    </Panel>
  );
}
