/** Runs that a proof orders, and how it ends. The core ends a run by itself; what is here only asks for one. */
import 'server-only';
import type { Holding } from '@/db/client';
import { listLockouts } from '@/db/queries/lockout';
import { addPersonCommand } from '@/db/queries/person-command';
import { nodeBoot } from '@/db/queries/proof-evidence';
import { endProof, keepRecords, keepRuns, type KeptProof } from '@/db/queries/proof';
import { readMemory } from '@/db/queries/running';
import { isClear, nextStep, STEP_OF_RUN, stepBefore, type RunKind } from '@/lib/analysis/proof';
import { migrateMemory } from '@/lib/control/memory-versions';
import { LONGEST_PULSE_S, type ProofRun } from '@/lib/schema/proof';
import { firstWords, notNeededWords, STEP_TITLES } from '@/lib/wording/proving';
import { Problem } from './errors';
import { refuseEnded, type Act } from './proof-take';
import { standingProof, type StandingProof } from './proof-view';

const USUAL_S: Record<RunKind, number> = { pulse: 10, gain: 300, unplug: LONGEST_PULSE_S };

const conflict = (detail: string): Problem => new Problem('conflict', { detail });

export interface Ordered {
  proof: KeptProof;
  /** Of the order; null where nothing had to be ordered. */
  number: number | null;
}

/**
 * Orders a run. It ends by itself: in the core at its time, at the node with its lease.
 * @throws Problem `conflict` for what stands in its way, with what to do about it
 */
export async function orderRun(
  holding: Holding,
  act: Act,
  proof: KeptProof,
  given: { kind: RunKind; seconds?: number | undefined },
): Promise<Ordered> {
  refuseEnded(proof);
  const standing = await standingProof(holding, act, proof);
  refuseOutOfTurn(standing, given.kind, act.now);
  await refuseAsItStands(holding, act);
  const { house, channel, by, now } = act;
  const seconds = given.seconds ?? USUAL_S[given.kind];
  // the coil of a normally closed contact is on while its load stands: it is there to fall already
  const needsOrder = given.kind !== 'unplug' || channel.contact === 'NO';
  const body = { kind: 'prove', channel: channel.id, seconds } as const;
  const number = needsOrder ? await addPersonCommand(holding, house.id, { at: now, by, body }) : null;
  const run: ProofRun = {
    ...{ kind: given.kind, number, by, at: now.toISOString(), seconds, stoppedAt: null },
    until: new Date(now.getTime() + seconds * 1000).toISOString(),
    boot: await nodeBoot(holding, house.id, channel.node),
  };
  return { proof: await keepRuns(holding, house.id, proof, [...proof.runs, run]), number };
}

function refuseOutOfTurn({ steps, runs }: StandingProof, kind: RunKind, now: Date): void {
  const step = STEP_OF_RUN[kind];
  const before = stepBefore(steps, step);
  if (before !== null) throw conflict(firstWords(before));
  const own = steps.find((one) => one.step === step);
  if (own?.state === 'not-needed')
    throw conflict(`This run is not needed. ${notNeededWords(own.because ?? '')}`);
  if (runs.some((one) => !one.isOver)) throw conflict('A run goes on. Stop it, or let it end.');
  if (!isClear(steps, now.getTime()))
    throw conflict(
      'It is over 10 minutes since somebody looked that nobody is at the load. Look again, and say so.',
    );
}

async function refuseAsItStands(holding: Holding, { house, channel }: Act): Promise<void> {
  const standing = await listLockouts(holding, house.id);
  const lockout = standing.find((one) => one.channel === channel.key && one.removedAt === null);
  if (lockout !== undefined)
    throw conflict(
      `Locked out by ${lockout.by}: “${lockout.why}”. Have the lock-out removed before it is run.`,
    );
  const kept = await readMemory(holding, house.id);
  const node = kept?.state?.nodes.find((one) => one.key === channel.node);
  if (node?.online !== true)
    throw conflict(
      `Field node ${channel.node} is not heard, so nothing would move. See to its network and power first.`,
    );
  const load = migrateMemory(kept?.memory).channels.find((one) => one.id === channel.id);
  if (load?.counted === 'on')
    throw conflict(
      'The load runs already, so a run would show nothing. Wait until it stands, or have a grower turn it off by hand for an hour: a run goes before that.',
    );
}

/** Ends the run that goes on, at once. */
export async function stopRun(holding: Holding, act: Act, proof: KeptProof): Promise<Ordered> {
  refuseEnded(proof);
  const { house, channel, by, now } = act;
  const last = proof.runs.at(-1);
  if (last === undefined || last.stoppedAt !== null || now.getTime() >= Date.parse(last.until))
    throw conflict('No run goes on.');
  const body = { kind: 'prove-end', channel: channel.id } as const;
  const number =
    last.number === null ? null : await addPersonCommand(holding, house.id, { at: now, by, body });
  const runs = [...proof.runs.slice(0, -1), { ...last, stoppedAt: now.toISOString() }];
  return { proof: await keepRuns(holding, house.id, proof, runs), number };
}

/** All steps are done: the channel is proved. What was not needed is put down with its reason. */
export async function finishProof(holding: Holding, act: Act, proof: KeptProof): Promise<KeptProof> {
  refuseEnded(proof);
  const { steps } = await standingProof(holding, act, proof);
  const next = nextStep(steps);
  if (next !== null) throw conflict(`Not all is proved yet. Next: ${STEP_TITLES[next]}.`);
  const { by, now, house } = act;
  const records = steps.flatMap(({ step, state, because }) =>
    state === 'not-needed'
      ? [
          {
            ...{ step, result: 'not-needed' as const, by, at: now.toISOString() },
            ...{ note: notNeededWords(because ?? ''), figures: {} },
          },
        ]
      : [],
  );
  const whole = records.length === 0 ? proof : await keepRecords(holding, house.id, proof, records);
  return endProof(holding, house.id, whole, { outcome: 'proved', why: null }, { by, now });
}

/** A proof that is given up stays on record as far as it went. A run that goes on is ended. */
export async function giveUpProof(
  holding: Holding,
  act: Act,
  proof: KeptProof,
  why: string,
): Promise<Ordered> {
  refuseEnded(proof);
  const { by, now, house } = act;
  const last = proof.runs.at(-1);
  const runs = last !== undefined && last.stoppedAt === null && now.getTime() < Date.parse(last.until);
  const stopped = runs ? await stopRun(holding, act, proof) : { proof, number: null };
  const ended = await endProof(holding, house.id, stopped.proof, { outcome: 'given-up', why }, { by, now });
  return { proof: ended, number: stopped.number };
}
