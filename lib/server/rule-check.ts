import 'server-only';
import type { Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { findHouse } from '@/db/queries/house';
import { loadHouseConfig } from '@/db/queries/plan';
import { listPoints, pointNumbers } from '@/db/queries/point';
import { readSeries } from '@/db/queries/reading';
import { resolveBody, type FoundRule } from '@/db/queries/rule';
import { readPreferences } from '@/db/queries/preferences';
import { check } from '@/lib/control/check';
import type { CheckContext } from '@/lib/control/checks/finding';
import type { Finding, RuleBody } from '@/lib/schema/rule';
import type { Channel } from '@/lib/schema/yard-view';
import type { Caller } from './caller';
import { Problem } from './errors';
import { answersOf, NOTHING, type HouseAnswers } from './house-answers';

const NIGHTS_MS = 14 * 86_400_000;

export interface Checked {
  findings: Finding[];
  /** What could not be looked at, for want of readings. */
  notKnown: string[];
}

/**
 * Things to look at in the draft (else in what is in force), or in a body that is still being typed; a person is told in
 * their own degrees, a program in °C.
 * @throws Refusal at the path of a point that the house does not have
 */
export async function findingsOf(
  holding: Holding,
  rule: Pick<FoundRule, 'id' | 'houseId' | 'channel' | 'body'>,
  typed: RuleBody | undefined,
  { caller, now }: { caller: Pick<Caller, 'userId'>; now: Date },
): Promise<Checked> {
  const { id, houseId, channel } = rule;
  const body = typed === undefined ? rule.body : await resolveBody(holding, houseId, typed);
  const config = await loadHouseConfig(holding, houseId);
  if (config === null) throw new Problem('not-found');
  const channels = await listChannels(holding, houseId);
  const points = await listPoints(holding, houseId);
  const greatest = await greatestOf(holding, houseId, body.rest?.until?.point, now);
  const own = channels.find((one) => one.key === channel);
  const answers =
    own === undefined ? NOTHING : await answersOf(holding, config, own, body.point, now.getTime());
  const { liftK, response, coldestOutdoors } = answers;
  const resort = (await findHouse(holding, houseId))?.lastResort ?? null;
  const context: CheckContext = {
    channels: factsOf(channels),
    corrected: points.flatMap(({ key, offset, gain }) => (offset === 0 && gain === 1 ? [] : [key])),
    lastResort: resort === null ? null : { below: resort.below, isProved: resort.provedOn !== null },
    ...(greatest === null ? {} : { greatest }),
    ...(liftK === null ? {} : { liftK }),
    ...(response === null ? {} : { response }),
    ...(coldestOutdoors === null ? {} : { coldestOutdoors }),
    ...(caller.userId === null ? {} : { preferences: await readPreferences(caller.userId) }),
  };
  return {
    findings: check(config, { id, channel, body }, context),
    notKnown: notKnownOf(body, answers, greatest, (own?.startsPerHour ?? null) !== null),
  };
}

function notKnownOf(
  body: RuleBody,
  { liftK, response }: HouseAnswers,
  greatest: Record<string, number> | null,
  isRated: boolean,
): string[] {
  return [
    ...(liftK === null && body.purpose === 'warm'
      ? ['How much warmer than outdoors this gets: that takes some nights of draws that a rest ended.']
      : []),
    ...(response === null && isRated
      ? ['How often it would start: that takes some nights of starts that stand half an hour apart.']
      : []),
    ...(greatest === null && body.rest?.until !== undefined
      ? ['Whether a rest would ever reach its temperature: its point has no readings yet.']
      : []),
  ];
}

function factsOf(channels: Channel[]): NonNullable<CheckContext['channels']> {
  return Object.fromEntries(
    channels.map((one) => [
      one.key,
      {
        proved: one.provedAt !== null,
        startsPerHour: one.startsPerHour,
        volts: one.load.volts ?? null,
        supply: one.load.supply ?? null,
        contactAmps: one.load.contactAmps ?? null,
        hasFallback: one.fallback !== null,
      },
    ]),
  );
}

/** The greatest value that the recovery point reached of late: a level above it would never end a rest. */
async function greatestOf(
  holding: Holding,
  houseId: string,
  key: string | undefined,
  now: Date,
): Promise<Record<string, number> | null> {
  const point = key === undefined ? undefined : (await pointNumbers(holding, houseId)).get(key);
  if (point === undefined) return null;
  const to = now.getTime();
  const series = await readSeries(holding, [point.number], to - NIGHTS_MS, to, 3600);
  const values = series.get(point.number)?.greatest ?? [];
  return values.length === 0 ? null : { [point.key]: Math.max(...values) };
}

/**
 * @returns whether its channel is not proved, which was accepted
 * @throws Problem `conflict` for what keeps a draft out of force
 */
export async function refuseForce(
  holding: Holding,
  rule: FoundRule,
  acceptUnproved: boolean,
  act: { caller: Pick<Caller, 'userId'>; now: Date },
): Promise<{ isUnproved: boolean }> {
  if (rule.draft === null) throw conflict('This rule has no draft to put into force.');
  const channel = (await listChannels(holding, rule.houseId)).find((one) => one.id === rule.channelId);
  if (channel === undefined) throw conflict('The channel of this rule was taken out of use.');
  const isUnproved = channel.provedAt === null;
  if (isUnproved && !acceptUnproved) {
    throw conflict(
      `${channel.label} is not proved: nobody has seen that this relay moves this load. Prove it, or accept that (acceptUnproved).`,
    );
  }
  const { findings } = await findingsOf(holding, rule, undefined, act);
  const stops = findings.filter((one) => one.level === 'stop');
  if (stops.length === 0) return { isUnproved };
  const errors = stops.flatMap(({ paths, text }) => paths.map((path) => ({ path, message: text })));
  throw new Problem('conflict', { detail: stops.map((one) => one.text).join(' '), errors });
}

function conflict(detail: string): Problem {
  return new Problem('conflict', { detail });
}
