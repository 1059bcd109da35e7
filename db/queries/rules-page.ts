/** What the pages of rules show: the rules of a house with what they name, and one rule with its versions and a night. */
import { and, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { point } from '@/db/schema/node';
import { nightBefore, nightNamed, nightOf } from '@/lib/analysis/night';
import type { HouseState } from '@/lib/schema/house-state';
import type { Rule, RuleWithVersions } from '@/lib/schema/rule-view';
import type { Channel, House, Point, Source } from '@/lib/schema/yard-view';
import { listChannels } from './channel';
import { listPoints } from './point';
import { readSeries } from './reading';
import { findRule, listRules, toRuleWithVersions } from './rule';
import { readMemory } from './running';
import { listSources } from './source';

export interface RulesPage {
  house: House;
  rules: Rule[];
  /** Taken out of force; each can be brought back from its own page. */
  retired: Rule[];
  points: Point[];
  channels: Channel[];
  sources: Source[];
  /** Null until the worker has stepped this house for the first time. */
  state: HouseState | null;
}

export async function readRules(holding: Holding, house: House): Promise<RulesPage> {
  const all = await listRules(holding, house.id, true);
  return {
    house,
    rules: all.filter((rule) => rule.retiredAt === null),
    retired: all.filter((rule) => rule.retiredAt !== null),
    points: await listPoints(holding, house.id),
    channels: await listChannels(holding, house.id),
    sources: await listSources(holding, house.id),
    state: (await readMemory(holding, house.id))?.state ?? null,
  };
}

/** Readings of one point through a night, as means of five minutes. */
export interface PointNight {
  point: string;
  at: number[];
  value: number[];
}

export interface RulePage extends Omit<RulesPage, 'rules' | 'retired'> {
  rule: RuleWithVersions;
  /** Names of the other rules in force on its channel. */
  others: string[];
  night: { name: string; from: number; to: number };
  /** Of the house's air and benches, of outdoors, and of the point the rule goes by. */
  readings: PointNight[];
}

/** Hours past noon before the night in progress says more than the one before. */
const YOUNG_NIGHT_MS = 8 * 3_600_000;
const STEP_S = 300;

/** Null where this house has no such rule, though another of the holding may. */
export async function readRule(
  holding: Holding,
  house: House,
  ref: string,
  nowMs: number,
): Promise<RulePage | null> {
  const found = await findRule(holding, ref);
  if (found === null || found.houseId !== house.id) return null;
  const { rules, retired: _, ...page } = await readRules(holding, house);
  const tonight = nightOf(nowMs, house.zone);
  const night =
    nowMs - tonight.from < YOUNG_NIGHT_MS ? nightNamed(nightBefore(tonight.night, 1), house.zone) : tonight;
  const shown = await pointsOfNight(holding, house.id, found.body.point);
  const to = Math.min(night.to, nowMs);
  const series = await readSeries(holding, [...shown.keys()], night.from, to, STEP_S);
  return {
    ...page,
    rule: toRuleWithVersions(found),
    others: rules
      .filter((one) => one.id !== found.id && one.channel === found.channel && one.inForce !== null)
      .map((one) => one.name),
    night: { name: night.night, from: night.from, to: night.to },
    readings: [...shown].flatMap(([number, key]) => {
      const one = series.get(number);
      return one === undefined ? [] : [{ point: key, at: one.at, value: one.mean }];
    }),
  };
}

const AIR = ['house-air', 'bench', 'outdoors'];

/** Numbers and keys of the points a band is likely measured at, and of the one that it is. */
async function pointsOfNight(holding: Holding, houseId: string, own: string): Promise<Map<number, string>> {
  const rows = await holding.db
    .select({ number: point.number, key: point.key, role: point.role })
    .from(point)
    .where(and(eq(point.holdingId, holding.id), eq(point.houseId, houseId), isNull(point.removedAt)));
  const shown = rows.filter((row) => AIR.includes(row.role) || row.key === own);
  return new Map(shown.map((row) => [row.number, row.key]));
}
