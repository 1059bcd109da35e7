/** A step of a proof that somebody takes: what the program can see for itself is looked up, not asked. */
import 'server-only';
import type { Holding } from '@/db/client';
import { amendHouse } from '@/db/queries/house';
import { findNode } from '@/db/queries/node';
import { listAloneSwitchings } from '@/db/queries/node-log';
import { keepRecords, type KeptProof } from '@/db/queries/proof';
import { stepBefore } from '@/lib/analysis/proof';
import { HouseCreate } from '@/lib/schema/house';
import type { ProofFigures, ProofRecord, ProofStepTake } from '@/lib/schema/proof';
import { toLocal } from '@/lib/units/local-time';
import { USUAL } from '@/lib/units/preferences';
import { ratingVerdict, rcdTest } from '@/lib/wording/protection';
import { firstWords, notNeededWords } from '@/lib/wording/proving';
import { pointValue } from '@/lib/units/format';
import { merged } from './check';
import { Problem } from './errors';
import { runRecord, standingProof, type OfChannel, type StandingProof } from './proof-view';

export interface Act extends OfChannel {
  by: string;
}

const conflict = (detail: string): Problem => new Problem('conflict', { detail });

/** @throws Problem `conflict` where the proof is over */
export function refuseEnded(proof: KeptProof): void {
  if (proof.endedAt !== null) throw conflict('This proof is over. Begin another.');
}

/** @throws Problem `conflict` out of turn, and where what was seen of the house does not bear the step out */
export async function takeStep(
  holding: Holding,
  act: Act,
  proof: KeptProof,
  given: ProofStepTake,
): Promise<KeptProof> {
  refuseEnded(proof);
  const standing = await standingProof(holding, act, proof);
  const before = stepBefore(standing.steps, given.step);
  if (before !== null) throw conflict(firstWords(before));
  const own = standing.steps.find((one) => one.step === given.step);
  // a thermostat may be tried again before its year is over
  if (own?.state === 'not-needed' && given.step !== 'last-resort')
    throw conflict(`This step is not needed. ${notNeededWords(own.because ?? '')}`);
  return keepRecords(holding, act.house.id, proof, await recordsOf(holding, act, standing, given));
}

async function recordsOf(
  holding: Holding,
  act: Act,
  standing: StandingProof,
  given: ProofStepTake,
): Promise<ProofRecord[]> {
  const record = (
    figures: ProofFigures,
    result: ProofRecord['result'] = 'done',
    note?: string,
  ): ProofRecord => ({
    ...{ step: given.step, result, by: act.by, at: act.now.toISOString(), figures },
    note: note ?? ('note' in given && given.note !== undefined && given.note !== '' ? given.note : null),
  });
  switch (given.step) {
    case 'dead':
    case 'clear':
      return [record({})];
    case 'rating':
      return [record(ratingFigures(act))];
    case 'photographs':
      if (given.without !== undefined) return [record({}, 'without', given.without)];
      return [record(photographFigures(standing))];
    case 'seen': {
      const run = standing.runs.find((one) => one.kind === 'pulse');
      if (given.saw !== 'right') return [record({ saw: given.saw }, 'failed')];
      return [...(run === undefined ? [] : [runRecord(run)]), record({ saw: 'right' })];
    }
    case 'current':
      return [record(currentFigures(standing))];
    case 'gain':
      if (given.without !== undefined) return [record({}, 'without', given.without)];
      return [record(gainFigures(standing))];
    case 'unplugged':
      if (!given.fell) return [record({}, 'failed')];
      return [record(await fellFigures(holding, act, standing))];
    case 'fallback':
      if (!given.ran) return [record({}, 'failed')];
      return [record(await fallbackFigures(holding, act, standing))];
    case 'last-resort':
      return [await lastResort(holding, act, given, record)];
  }
}

function ratingFigures({ channel, house, now }: Act): ProofFigures {
  const { load, protection, highLimit } = channel;
  const verdict = ratingVerdict(load, protection, highLimit !== null);
  if (!verdict.isFit) throw conflict(verdict.words);
  const today = toLocal(now.getTime(), house.zone).slice(0, 10);
  const rcd = protection === null ? null : rcdTest(protection, today);
  return { words: verdict.words, rcd: rcd?.state ?? null, rcdDueOn: rcd?.dueOn ?? null };
}

function photographFigures({ pictures }: StandingProof): ProofFigures {
  const count = (shows: string) => pictures.filter((one) => one.shows === shows).length;
  const [plate, wiring] = [count('plate'), count('wiring')];
  if (plate === 0)
    throw conflict('A photograph of the rating plate is missing; add it, or say why there is none.');
  if (wiring === 0)
    throw conflict('A photograph of the wiring is missing; add it, or say why there is none.');
  return { plate, wiring };
}

function currentFigures({ runs }: StandingProof): ProofFigures {
  const shown = runs.flatMap((one) => (one.shown === null ? [] : [one.shown]));
  const told = shown.flatMap((one) => (one.greatest === null ? [] : [{ ...one, greatest: one.greatest }]));
  const best = told.sort((a, b) => b.greatest - a.greatest)[0];
  if (best === undefined)
    throw conflict(
      `No reading of ${shown[0]?.point ?? 'the point that shows it'} came during the run. Run it again, for longer than its node’s reporting interval.`,
    );
  const { point, greatest, above, unit, readings } = best;
  if (greatest <= above)
    throw conflict(
      `${point} showed ${pointValue(greatest, unit, USUAL)} at most while the load ran, and counts as running only over ${pointValue(above, unit, USUAL)}. Look at the sensor, or at the level in the channel’s form.`,
    );
  return { point, greatest, above, unit, readings };
}

function gainFigures({ runs }: StandingProof): ProofFigures {
  const run = runs.find((one) => one.kind === 'gain');
  if (run === undefined || !run.isOver)
    throw conflict('The gain run is not over. Let it end, or say why there is none.');
  if (run.gain === null)
    throw conflict(
      'No good readings of both ends of the loop came in the last third of the run. Run it for longer, or say why there is none.',
    );
  const { kelvin, sd } = run.gain;
  return { kelvin, sd, ranS: runRecord(run).figures['ranS'] ?? run.seconds };
}

async function fellFigures(holding: Holding, act: Act, { runs }: StandingProof): Promise<ProofFigures> {
  const node = await findNode(holding, act.house.id, act.channel.node);
  const run = runs.find((one) => one.kind === 'unplug');
  const fell = run?.fell ?? null;
  if (fell !== null) return { ...fell };
  // a board on a bus keeps no lease of ours and counts nothing
  if (node?.kind === 'modbus' && run !== undefined) return { how: 'seen', at: null, awayS: null };
  if (run === undefined)
    throw conflict('Begin the run for unplugging first: the coil has to be on when the network goes.');
  throw conflict(
    `Field node ${act.channel.node} has not told yet that its coil dropped. Leave its network off for more than 30 s while the load runs, put it back, and wait until it is heard again.`,
  );
}

async function fallbackFigures(holding: Holding, act: Act, { proof }: StandingProof): Promise<ProofFigures> {
  const from = proof.begunAt.getTime();
  const told = await listAloneSwitchings(holding, act.house.id, from, act.now.getTime() + 1);
  const own = told.filter((one) => one.channelId === act.channel.id);
  const on = own.findLast((one) => one.state === 'on');
  return { switchings: own.length, onAt: on === undefined ? null : new Date(on.at).toISOString() };
}

/** What was seen of it is the house's: every rule's check goes by it. */
async function lastResort(
  holding: Holding,
  { house, now }: Act,
  given: Extract<ProofStepTake, { step: 'last-resort' }>,
  record: (figures: ProofFigures, result?: ProofRecord['result'], note?: string) => ProofRecord,
): Promise<ProofRecord> {
  const { below, cameOnAt, without } = given;
  if (without !== undefined) return record({}, 'without', without);
  const missing = [
    ...(below === undefined ? [{ path: 'below', message: 'Say what it is set to.' }] : []),
    ...(cameOnAt === undefined ? [{ path: 'cameOnAt', message: 'Say at what temperature it came on.' }] : []),
  ];
  if (below === undefined || cameOnAt === undefined) throw new Problem('not-valid', { errors: missing });
  const provedOn = toLocal(now.getTime(), house.zone).slice(0, 10);
  const change = merged(HouseCreate, house, { lastResort: { below, provedOn } });
  await amendHouse(holding, house.id, change, now);
  return record({ below, cameOnAt });
}
