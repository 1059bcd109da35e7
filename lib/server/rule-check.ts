import 'server-only';
import type { Holding } from '@/db/client';
import { listChannels } from '@/db/queries/channel';
import { loadHouseConfig } from '@/db/queries/plan';
import { pointNumbers } from '@/db/queries/point';
import { readSeries } from '@/db/queries/reading';
import { resolveBody, type FoundRule } from '@/db/queries/rule';
import { check } from '@/lib/control/check';
import type { CheckContext } from '@/lib/control/checks/finding';
import type { Finding, RuleBody } from '@/lib/schema/rule';
import type { Channel } from '@/lib/schema/yard-view';
import { Problem } from './errors';

const NIGHTS_MS = 14 * 86_400_000;

/**
 * Things to look at in the draft (else in what is in force), or in a body that is still being typed.
 * @throws Refusal at the path of a point that the house does not have
 */
export async function findingsOf(
  holding: Holding,
  rule: Pick<FoundRule, 'id' | 'houseId' | 'channel' | 'body'>,
  typed: RuleBody | undefined,
  now: Date,
): Promise<Finding[]> {
  const { id, houseId, channel } = rule;
  const body = typed === undefined ? rule.body : await resolveBody(holding, houseId, typed);
  const config = await loadHouseConfig(holding, houseId);
  if (config === null) throw new Problem('not-found');
  const channels = await listChannels(holding, houseId);
  const greatest = await greatestOf(holding, houseId, body.rest?.until?.point, now);
  const context: CheckContext = { channels: factsOf(channels), ...(greatest === null ? {} : { greatest }) };
  return check(config, { id, channel, body }, context);
}

function factsOf(channels: Channel[]): NonNullable<CheckContext['channels']> {
  return Object.fromEntries(
    channels.map((one) => [
      one.key,
      {
        proved: one.provedAt !== null,
        startsPerHour: one.startsPerHour,
        volts: one.load.volts ?? null,
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

/** @throws Problem `conflict` for what keeps a draft out of force */
export async function refuseForce(
  holding: Holding,
  rule: FoundRule,
  acceptUnproved: boolean,
  now: Date,
): Promise<void> {
  if (rule.draft === null) throw conflict('This rule has no draft to put into force.');
  const channel = (await listChannels(holding, rule.houseId)).find((one) => one.id === rule.channelId);
  if (channel === undefined) throw conflict('The channel of this rule was taken out of use.');
  if (channel.provedAt === null && !acceptUnproved) {
    throw conflict(
      `${channel.label} is not proved: nobody has seen that this relay moves this load. Prove it, or accept that (acceptUnproved).`,
    );
  }
  const stops = (await findingsOf(holding, rule, undefined, now)).filter((one) => one.level === 'stop');
  if (stops.length === 0) return;
  const errors = stops.flatMap(({ paths, text }) => paths.map((path) => ({ path, message: text })));
  throw new Problem('conflict', { detail: stops.map((one) => one.text).join(' '), errors });
}

function conflict(detail: string): Problem {
  return new Problem('conflict', { detail });
}
