import type { ReactNode } from 'react';
import { Age } from '@/components/ui/age';
import { CardCell, CardRow, CardRowHead, type CardColumn } from '@/components/ui/card-table';
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

const TERM = {
  node: 'Node',
  heard: 'Last heard',
  firmware: 'Firmware',
  boot: 'Boot',
  clock: 'Clock error, s',
  rate: 'Readings a minute',
  trips: 'Lease trips',
  refused: 'Refused',
  token: 'Token',
};
export const NODE_COLUMNS: readonly CardColumn[] = [
  { key: 'node', label: TERM.node },
  { key: 'heard', label: TERM.heard },
  { key: 'firmware', label: TERM.firmware },
  { key: 'boot', label: TERM.boot },
  { key: 'clock', label: TERM.clock, figure: true },
  { key: 'rate', label: TERM.rate, figure: true },
  { key: 'trips', label: TERM.trips, figure: true },
  { key: 'refused', label: TERM.refused, figure: true },
  { key: 'token', label: TERM.token },
  { key: 'act', label: 'Change', labelHidden: true },
];

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
    <ul className="font-sans text-[0.85rem] whitespace-normal text-soft sm:ml-auto sm:w-52">
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
    <CardRowHead className="min-w-36">
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
    </CardRowHead>
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
    <CardRow>
      <Name node={node} status={status} trouble={linkTrouble(kept)} />
      <CardCell term={TERM.heard} className="whitespace-nowrap">
        {node.lastHeardAt === null ? (
          <span className="font-semibold text-warn">Never</span>
        ) : (
          <Age at={Date.parse(node.lastHeardAt)} />
        )}
      </CardCell>
      <CardCell term={TERM.firmware}>{status.firmware ?? unknown}</CardCell>
      <CardCell term={TERM.boot}>
        <Boot status={status} />
      </CardCell>
      <CardCell term={TERM.clock} figure>
        {status.clockErrorS === null ? unknown : decimal(status.clockErrorS, 1)}
      </CardCell>
      <CardCell term={TERM.rate} figure>
        {status.readingsAMinute === null ? (
          <span className="font-sans text-soft">not known yet</span>
        ) : (
          decimal(status.readingsAMinute, 1)
        )}
      </CardCell>
      <CardCell term={TERM.trips} figure>
        {status.trips ?? unknown}
      </CardCell>
      <CardCell term={TERM.refused} figure>
        {status.refused ?? unknown}
        {status.refusals.length === 0 ? null : <Refusals refusals={status.refusals} />}
      </CardCell>
      <CardCell term={TERM.token}>{tokenWords(node, now, zone, preferences)}</CardCell>
      <CardCell className="align-middle">
        <div className="flex flex-wrap max-sm:-ml-4 sm:justify-end">
          <NodeTailButton node={node.key} {...{ houseId, preferences }} />
          <ChangeButton kind="node" id={node.id} of={node.key} />
          <TokenButtons
            nodeId={node.id}
            nodeKey={node.key}
            isBoard={node.kind === 'modbus'}
            isRevoked={node.revokedAt !== null}
          />
        </div>
      </CardCell>
    </CardRow>
  );
}
