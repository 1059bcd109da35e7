import { Age } from '@/components/ui/age';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { FieldNode } from '@/lib/schema/yard-view';
import { decimal } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { NODE_WORDS } from '@/lib/wording/wiring-parts';
import { BusLine } from './bus-line';
import { AddButton, ChangeButton, TokenButtons } from './editing';
import { linkTrouble, nodeStatus, type NodeStatus } from './node-status';

const columns = [
  { key: 'node', label: 'Node' },
  { key: 'heard', label: 'Last heard' },
  { key: 'firmware', label: 'Firmware' },
  { key: 'boot', label: 'Boot', wideOnly: true },
  { key: 'clock', label: 'Clock error, s', figure: true },
  { key: 'trips', label: 'Lease trips', figure: true, wideOnly: true },
  { key: 'refused', label: 'Refused', figure: true },
  { key: 'token', label: 'Token' },
  { key: 'act', label: 'Change', labelHidden: true },
];

const unknown = <span className="font-sans text-soft">not told</span>;

function tokenWords(node: FieldNode, now: number, zone: string, preferences: Preferences): string {
  if (node.revokedAt !== null) return `Revoked ${moment(Date.parse(node.revokedAt), now, zone, preferences)}`;
  const until = node.formerTokenUntil === null ? 0 : Date.parse(node.formerTokenUntil);
  return until > now ? `Valid; the one before till ${moment(until, now, zone, preferences)}` : 'Valid';
}

/** Readings that were not taken: what each calls its point, and what is wrong with it. */
function Refusals({ refusals }: { refusals: NodeStatus['refusals'] }) {
  return (
    <ul className="ml-auto w-52 font-sans text-[0.85rem] whitespace-normal text-soft">
      {refusals.map(({ name, why }) => (
        <li key={`${name} ${why}`} className="wrap-anywhere">
          {name === '' ? 'without a name' : name}: {why}
        </li>
      ))}
    </ul>
  );
}

/** Field nodes: when each was last heard, and how it is. */
export function Nodes({
  nodes,
  kept,
  zone,
  now,
  preferences,
}: {
  nodes: FieldNode[];
  kept: Record<string, Record<string, unknown>>;
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
        <Table caption="Field nodes" captionHidden columns={columns}>
          {nodes.map((node) => {
            const status = nodeStatus(kept[node.id]);
            return (
              <Row key={node.id}>
                <RowHead className="min-w-36">
                  <span className="font-mono">{node.key}</span>
                  <span className="block text-[0.85rem] font-normal text-soft">
                    {NODE_WORDS[node.kind]}; {node.channels} relays, reports every {node.reportEvery}&nbsp;s
                    {status.canFallback === 'can' ? '; can keep a house by itself' : ''}
                  </span>
                  <BusLine node={node} trouble={linkTrouble(kept[node.id])} />
                </RowHead>
                <Cell className="whitespace-nowrap">
                  {node.lastHeardAt === null ? (
                    <span className="font-semibold text-warn">Never</span>
                  ) : (
                    <Age at={Date.parse(node.lastHeardAt)} />
                  )}
                </Cell>
                <Cell>{status.firmware ?? unknown}</Cell>
                <Cell wideOnly>
                  {status.boot === null ? (
                    unknown
                  ) : (
                    <span className="font-mono text-[0.85rem]">{status.boot.slice(0, 8)}</span>
                  )}
                </Cell>
                <Cell figure>{status.clockErrorS === null ? unknown : decimal(status.clockErrorS, 1)}</Cell>
                <Cell figure wideOnly>
                  {status.trips ?? unknown}
                </Cell>
                <Cell figure>
                  {status.refused ?? unknown}
                  {status.refusals.length === 0 ? null : <Refusals refusals={status.refusals} />}
                </Cell>
                <Cell>{tokenWords(node, now, zone, preferences)}</Cell>
                <Cell className="align-middle">
                  <div className="flex justify-end">
                    <ChangeButton kind="node" id={node.id} of={node.key} />
                    <TokenButtons nodeId={node.id} nodeKey={node.key} isRevoked={node.revokedAt !== null} />
                  </div>
                </Cell>
              </Row>
            );
          })}
        </Table>
      )}
    </Panel>
  );
}
