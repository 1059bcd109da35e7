import type { ReactNode } from 'react';
import { Age } from '@/components/ui/age';
import { Cell, Row, RowHead } from '@/components/ui/table';
import type { FieldNode } from '@/lib/schema/yard-view';
import { decimal } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { NODE_WORDS } from '@/lib/wording/wiring-parts';
import { BusLine } from './bus-line';
import { ChangeButton } from './editing';
import { TokenButtons } from './node-buttons';
import { linkTrouble, nodeStatus, type NodeStatus } from './node-status';
import { NodeTailButton } from './node-tail';

const unknown = <span className="font-sans text-soft">not told</span>;

function tokenWords(node: FieldNode, now: number, zone: string, preferences: Preferences): string {
  const isBoard = node.kind === 'modbus';
  if (node.revokedAt !== null)
    return `${isBoard ? 'Left alone since' : 'Revoked'} ${moment(Date.parse(node.revokedAt), now, zone, preferences)}`;
  if (isBoard) return 'None: it is reached from here';
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

function Name({
  node,
  status,
  trouble,
}: {
  node: FieldNode;
  status: NodeStatus;
  trouble: ReturnType<typeof linkTrouble>;
}) {
  const differs = status.relaysTold !== null && status.relaysTold !== node.channels;
  return (
    <RowHead className="min-w-36">
      <span className="font-mono">{node.key}</span>
      <span className="block text-[0.85rem] font-normal text-soft">
        {NODE_WORDS[node.kind]}; {node.channels} relays, reports every {node.reportEvery}&nbsp;s
        {status.canFallback === 'can' ? '; can keep a house by itself' : ''}
      </span>
      <BusLine node={node} trouble={trouble} />
      {differs ? (
        <span className="block text-[0.85rem] text-warn">
          It says that it has {status.relaysTold} relays; {node.channels} are registered. Change one of the
          two.
        </span>
      ) : null}
    </RowHead>
  );
}

function Boot({ status }: { status: NodeStatus }): ReactNode {
  if (status.boot === null) return unknown;
  return (
    <>
      <span className="font-mono text-[0.85rem]">{status.boot.slice(0, 8)}</span>
      {status.restarts === null ? null : (
        <span className="block text-[0.85rem] text-soft">
          {status.restarts === 1 ? '1 restart' : `${status.restarts} restarts`}
        </span>
      )}
    </>
  );
}

/** One node: when it was last heard, and how it is. */
export function NodeRow({
  node,
  kept,
  houseId,
  zone,
  now,
  preferences,
}: {
  node: FieldNode;
  kept: Record<string, unknown> | undefined;
  houseId: string;
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  const status = nodeStatus(kept);
  return (
    <Row>
      <Name node={node} status={status} trouble={linkTrouble(kept)} />
      <Cell className="whitespace-nowrap">
        {node.lastHeardAt === null ? (
          <span className="font-semibold text-warn">Never</span>
        ) : (
          <Age at={Date.parse(node.lastHeardAt)} />
        )}
      </Cell>
      <Cell>{status.firmware ?? unknown}</Cell>
      <Cell wideOnly>
        <Boot status={status} />
      </Cell>
      <Cell figure>{status.clockErrorS === null ? unknown : decimal(status.clockErrorS, 1)}</Cell>
      <Cell figure>
        {status.readingsAMinute === null ? (
          <span className="font-sans text-soft">not known yet</span>
        ) : (
          decimal(status.readingsAMinute, 1)
        )}
      </Cell>
      <Cell figure wideOnly>
        {status.trips ?? unknown}
      </Cell>
      <Cell figure>
        {status.refused ?? unknown}
        {status.refusals.length === 0 ? null : <Refusals refusals={status.refusals} />}
      </Cell>
      <Cell>{tokenWords(node, now, zone, preferences)}</Cell>
      <Cell className="align-middle">
        <div className="flex flex-wrap justify-end">
          <NodeTailButton node={node.key} {...{ houseId, preferences }} />
          <ChangeButton kind="node" id={node.id} of={node.key} />
          <TokenButtons
            nodeId={node.id}
            nodeKey={node.key}
            isBoard={node.kind === 'modbus'}
            isRevoked={node.revokedAt !== null}
          />
        </div>
      </Cell>
    </Row>
  );
}
