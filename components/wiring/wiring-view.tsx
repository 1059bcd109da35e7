import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Sentence } from '@/components/ui/sentence';
import type { HouseState } from '@/lib/schema/house-state';
import type { Training } from '@/lib/schema/training';
import type { Preferences } from '@/lib/units/preferences';
import { sentences } from '@/lib/wording/join';
import type { Phrase } from '@/lib/wording/phrase';
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
import { standingOf } from './standing';
import { TrainingPanel } from './training-panel';

export interface WiringData extends Yard {
  nodeStatus: Record<string, Record<string, unknown>>;
  ranAlone: Record<string, number>;
  channelAlarms: Record<string, string[]>;
  proofs: Record<string, LastProof>;
  state: HouseState | null;
}

const isHeard = (node: { lastHeardAt: string | null }, now: number) =>
  node.lastHeardAt !== null && now - Date.parse(node.lastHeardAt) <= LEASE_S * 1000;

/** The page Wiring: how it stands in a sentence, the boards, then everything that is wired. */
export function WiringView({
  data,
  training,
  allowed,
  preferences,
  now,
  missing,
}: {
  data: WiringData;
  training: Training;
  /** What of its set-up is missing; empty: nothing. */
  missing: Phrase[];
  allowed: readonly string[];
  preferences: Preferences;
  now: number;
}) {
  const { nodeStatus, ranAlone, channelAlarms, proofs, state, ...yard } = data;
  const { house, nodes, channels, points, lockouts, sources } = yard;
  const { zone } = house;
  const can = canFallback(nodes, nodeStatus);
  const standing = standingOf(yard, can, state);
  return (
    <WiringEditing yard={yard} preferences={preferences} allowed={allowed}>
      <div className="flex flex-col gap-5">
        <Sentence before="Wiring" phrases={sentences(missing, wiringSentence(standing, now))} />
        <div className="flex flex-wrap gap-2">
          <ButtonLink href={`/${house.slug}/setup`}>
            {missing.length === 0 && nodes.length > 0 ? 'Its set-up, step by step' : 'Go on with the set-up'}
          </ButtonLink>
          <ButtonLink href={`/${house.slug}/wiring/sheet`}>The printed sheet</ButtonLink>
        </div>
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
            channelAlarms={channelAlarms}
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
        <Nodes
          kept={nodeStatus}
          pointKeys={points.map(({ key }) => key)}
          houseId={house.id}
          {...{ nodes, zone, now, preferences }}
        />
        <Points
          house={house.slug}
          states={state?.points ?? []}
          {...{ points, nodes, now, zone, preferences }}
        />
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
        <TrainingPanel
          {...{ training, zone, now, preferences }}
          house={house.slug}
          mayOrder={allowed.includes('wiring.write')}
        />
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
