import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import type { HouseState } from '@/lib/schema/house-state';
import type { Preferences } from '@/lib/units/preferences';
import { LEASE_S, wiringSentence } from '@/lib/wording/wiring';
import { Channels } from './channels';
import { WiringEditing } from './editing';
import type { Yard } from './forms/options';
import { HousePanel } from './house-panel';
import { FormerLockOuts } from './lock-outs';
import { canFallback } from './node-status';
import { Nodes } from './nodes';
import { Points } from './points';
import type { LastProof } from './proved-cell';
import { RelayBoard } from './relay-board';
import { Interlocks } from './interlocks';
import { Sources } from './sources';

export interface WiringData extends Yard {
  nodeStatus: Record<string, Record<string, unknown>>;
  ranAlone: Record<string, number>;
  proofs: Record<string, LastProof>;
  state: HouseState | null;
}

const isHeard = (node: { lastHeardAt: string | null }, now: number) =>
  node.lastHeardAt !== null && now - Date.parse(node.lastHeardAt) <= LEASE_S * 1000;

/** The page Wiring: how it stands in a sentence, the boards, then everything that is wired. */
export function WiringView({
  data,
  allowed,
  preferences,
  now,
}: {
  data: WiringData;
  allowed: readonly string[];
  preferences: Preferences;
  now: number;
}) {
  const { nodeStatus, ranAlone, proofs, state, ...yard } = data;
  const { house, nodes, channels, points, lockouts, sources } = yard;
  const { zone } = house;
  const can = canFallback(nodes, nodeStatus);
  const isLocked = (key: string) => lockouts.some((one) => one.channel === key && one.removedAt === null);
  const standing = {
    nodes: nodes.map((node) => ({
      key: node.key,
      lastHeardAt: node.lastHeardAt === null ? null : Date.parse(node.lastHeardAt),
      isRevoked: node.revokedAt !== null,
      keeps: channels
        .filter((one) => one.node === node.key && one.fallback !== null && can[node.key] === 'can')
        .map((one) => one.label),
    })),
    points: points.map((point) => ({
      name: point.name,
      isGood: state?.points.find((one) => one.key === point.key)?.quality === 'good',
    })),
    channels: channels.map((channel) => ({
      number: channel.number,
      label: channel.label,
      isProved: channel.provedAt !== null,
      isLockedOut: isLocked(channel.key),
    })),
  };
  return (
    <WiringEditing yard={yard} preferences={preferences} allowed={allowed}>
      <div className="flex flex-col gap-5">
        <Sentence before="Wiring" phrases={wiringSentence(standing, now)} />
        {allowed.includes('wiring.write') ? null : (
          <Notice tone="quiet" title="You can read the wiring, not change it.">
            Wiring decides what a relay may do to whoever stands at it, so an installer or an owner changes
            it. You may lock a channel out.
          </Notice>
        )}
        {nodes.map((node) => (
          <RelayBoard
            key={node.id}
            node={node}
            channels={channels}
            // what a silent node last said is no longer true: its leases have run out
            states={isHeard(node, now) ? (state?.channels ?? []) : []}
          />
        ))}
        <Channels
          channels={channels}
          sources={sources}
          lockouts={lockouts}
          house={house.slug}
          alone={{ can, ran: ranAlone }}
          proofs={proofs}
          {...{ points, zone, now, preferences }}
          hasNode={nodes.some((node) => node.channels > 0)}
        />
        <Nodes nodes={nodes} kept={nodeStatus} zone={zone} now={now} preferences={preferences} />
        <Points points={points} states={state?.points ?? []} nodes={nodes} {...{ now, zone, preferences }} />
        <div className="grid grid-cols-1 gap-5 xl:grid-cols-2">
          <Sources
            sources={sources}
            loops={yard.loops}
            points={points}
            channels={channels}
            preferences={preferences}
          />
          <div className="flex min-w-0 flex-col gap-5">
            <Interlocks interlocks={yard.interlocks} channels={channels} />
            <HousePanel house={house} preferences={preferences} mayAdd={allowed.includes('yard.write')} />
          </div>
        </div>
        <FormerLockOuts
          lockouts={lockouts}
          channels={channels}
          zone={zone}
          now={now}
          preferences={preferences}
        />
      </div>
    </WiringEditing>
  );
}
