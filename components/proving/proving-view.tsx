'use client';
import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import type { Proof } from '@/lib/schema/proof';
import { day } from '@/lib/units/time';
import { provingSentence } from '@/lib/wording/proving';
import { isMains } from '@/lib/wording/wiring-load';
import { LOOP_CAUTION, MAINS_CAUTION } from '@/lib/wording/wiring-parts';
import { ChannelFacts } from './channel-facts';
import { ProvingContext, type ProvingData } from './context';
import { FormerProofs } from './former-proofs';
import { GoingProof, NoProof } from './going-proof';
import { useProof } from './use-proof';

export interface ProvingStart extends ProvingData {
  /** The proof that goes on; null: none does. */
  proof: Proof | null;
  /** Those that ended, newest first. */
  former: Proof[];
  lockout: { by: string; why: string } | null;
}

/** One channel beside its panel: what is proved, what comes next, what was found. */
export function ProvingView({ start, mayProve }: { start: ProvingStart; mayProve: boolean }) {
  const { house, channel, isHeapFan, lockout } = start;
  const acts = useProof(house.slug, start.proof);
  const { proof } = acts;
  const needed = (proof?.steps ?? []).filter((one) => one.state !== 'not-needed');
  const settled = needed.filter((one) => one.state === 'done' || one.state === 'without');
  const provedAt = channel.provedAt === null ? null : Date.parse(channel.provedAt);
  const standing = {
    channel,
    steps:
      proof === null || proof.endedAt !== null ? null : { needed: needed.length, settled: settled.length },
    provedAt,
    lockedOut: lockout !== null,
  };
  return (
    <ProvingContext value={{ ...start, ...acts }}>
      <div className="flex flex-col gap-5">
        <p>
          <Link
            href={`/${house.slug}/wiring`}
            className="inline-flex min-h-11 items-center underline underline-offset-4"
          >
            Wiring of {house.name}
          </Link>
        </p>
        <Sentence
          before="Proving"
          phrases={provingSentence(standing, provedAt === null ? null : day(provedAt, house.zone))}
        />
        {mayProve ? null : (
          <Notice tone="quiet" title="You can read a proof, not make one.">
            A proof runs a load for whoever stands at it, so an installer or an owner makes it.
          </Notice>
        )}
        <div className="grid grid-cols-1 items-start gap-5 xl:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
          <Panel title={`Proving channel ${channel.number}`}>
            {proof === null || proof.endedAt !== null ? (
              <NoProof mayProve={mayProve} ended={proof} />
            ) : (
              <GoingProof proof={proof} mayProve={mayProve} />
            )}
          </Panel>
          <div className="flex min-w-0 flex-col gap-5">
            <ChannelFacts channel={channel} />
            {isMains(channel.load) ? (
              <Notice tone="warn" title="Mains in a damp house">
                {MAINS_CAUTION}
              </Notice>
            ) : null}
            {isHeapFan ? (
              <Notice tone="warn" title="Air of a heap">
                {LOOP_CAUTION}
              </Notice>
            ) : null}
          </div>
        </div>
        <FormerProofs proofs={start.former} />
      </div>
    </ProvingContext>
  );
}
