/** How a proof stands: its records beside what the channel needs now and what was seen of its runs. */
import 'server-only';
import type { Holding } from '@/db/client';
import { listLoops } from '@/db/queries/loop';
import { nodeCanFallback } from '@/db/queries/proof-evidence';
import { picturesOf } from '@/db/queries/proof-picture';
import type { KeptProof } from '@/db/queries/proof';
import { proofSteps, RESORT_HOLDS_MS, type ProofNeeds, type StepStanding } from '@/lib/analysis/proof';
import type { Proof, ProofPicture, ProofRecord, RunSeen } from '@/lib/schema/proof';
import type { Channel, House } from '@/lib/schema/yard-view';
import { runsSeen } from './proof-run';

export interface OfChannel {
  house: House;
  channel: Channel;
  now: Date;
}

export interface StandingProof {
  proof: KeptProof;
  steps: StepStanding<Word>[];
  runs: RunSeen[];
  pictures: ProofPicture[];
}
type Word = Omit<ProofRecord, 'at'> & { at: number };

const wordsOf = (proof: KeptProof): Word[] =>
  proof.records.map((one) => ({ ...one, at: Date.parse(one.at) }));

/** A proof that ended, by its records alone: what the channel has become since does not bear on it. */
export async function endedProof(holding: Holding, proof: KeptProof): Promise<StandingProof> {
  const pictures = await picturesOf(holding, proof.id);
  return { proof, steps: proofSteps(wordsOf(proof), ALL), runs: [], pictures };
}

/** A proof that goes on, as it stands now. */
export async function standingProof(
  holding: Holding,
  of: OfChannel,
  proof: KeptProof,
): Promise<StandingProof> {
  const pictures = await picturesOf(holding, proof.id);
  const words = wordsOf(proof);
  const runs = await runsSeen(holding, { ...of, now: of.now.getTime() }, proof);
  const ran = pulseWord(words, runs);
  const steps = proofSteps(ran === null ? words : [...words, ran], await needsOf(holding, of));
  return { proof, steps, runs, pictures };
}

const ALL: ProofNeeds = {
  ...{ hasRunProof: true, hasLoop: true, hasFallback: true, nodeCanFallback: true },
  ...{ hasFrostLimit: true, warms: true, lastResortSeen: false },
};

async function needsOf(holding: Holding, { house, channel, now }: OfChannel): Promise<ProofNeeds> {
  const loops = await listLoops(holding, house.id);
  const seenOn = house.lastResort?.provedOn ?? null;
  return {
    hasRunProof: channel.runProof !== null,
    hasLoop: channel.source !== null && loops.some((one) => one.channel === channel.key),
    hasFallback: channel.fallback !== null,
    nodeCanFallback: await nodeCanFallback(holding, house.id, channel.node),
    hasFrostLimit: house.frostLimit !== null,
    warms: channel.frostHelp || channel.load.kind === 'heater',
    lastResortSeen: seenOn !== null && now.getTime() - Date.parse(seenOn) < RESORT_HOLDS_MS,
  };
}

/** A pulse that was over and that the relay followed stands for its step until somebody has said what they saw. */
function pulseWord(words: readonly Word[], runs: readonly RunSeen[]): Word | null {
  const pulse = runs.find((one) => one.kind === 'pulse');
  if (pulse === undefined || !pulse.isOver || pulse.startedAt === null) return null;
  const at = Date.parse(pulse.at);
  const isUsedUp = words.some((one) => one.result === 'failed' && one.at >= at);
  return isUsedUp ? null : { ...runRecord(pulse), at };
}

/** What is kept of a run once somebody has said what they saw of it. */
export function runRecord(run: RunSeen): ProofRecord {
  const { by, at, seconds, startedAt, endedAt, until } = run;
  const ranS =
    startedAt === null ? null : Math.round((Date.parse(endedAt ?? until) - Date.parse(startedAt)) / 1000);
  return { step: 'run', result: 'done', by, at, note: null, figures: { seconds, ranS, startedAt, endedAt } };
}

export function toProof({ proof, steps, runs, pictures }: StandingProof): Proof {
  const { id, revision, channel, begunBy, endedBy, outcome, endedWhy, records } = proof;
  return {
    ...{ id, revision, channel, begunBy, begunAt: proof.begunAt.toISOString() },
    ...{ endedBy, endedAt: proof.endedAt?.toISOString() ?? null, outcome, endedWhy },
    steps: steps.map(({ step, state, because, word }) => ({
      ...{ step, state },
      because: because ?? (state === 'not-needed' ? (word?.note ?? null) : null),
      record: word === null ? null : { ...word, at: new Date(word.at).toISOString() },
    })),
    ...{ records, runs, pictures },
  };
}
