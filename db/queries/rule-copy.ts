import 'server-only';
import type { Holding } from '@/db/client';
import type { RuleBody, RuleCopy } from '@/lib/schema/rule';
import { mapRulePoints, pointsOfRule } from '@/lib/schema/rule-points';
import type { Point } from '@/lib/schema/yard-view';
import { findHouse } from './house';
import { listPoints } from './point';
import { houseNames } from './reference';
import { Refusal } from './refusal';
import { addRule, type FoundRule } from './rule';

/**
 * A new rule, as a draft, that says of another channel what this one says of its own. It never comes into force by
 * itself, and changes of either rule do not reach the other.
 * @throws Refusal at the path of what does not fit: `house`, `channel`, `version`, `points.2.to`
 */
export async function copyRule(
  holding: Holding,
  rule: FoundRule,
  given: RuleCopy,
  act: { by: string; now: Date },
): Promise<FoundRule> {
  const house = await findHouse(holding, given.house ?? rule.houseId);
  if (house === null) throw new Refusal('house', `There is no house ${JSON.stringify(given.house)}.`);
  const { channels } = await houseNames(holding, house.id);
  const channelId = channels.find(given.channel, 'channel').id;
  const version = versionToCopy(rule, given.version);
  const points = await pointsThere(holding, rule, house.id, version.body, given.points);
  return addRule(
    holding,
    {
      ...{ houseId: house.id, channelId, name: given.name ?? rule.name },
      body: mapRulePoints(version.body, (key) => points.get(key) ?? key),
      copiedFrom: { rule: rule.id, version: version.number },
    },
    act,
  );
}

function versionToCopy(rule: FoundRule, number: number | undefined): { number: number; body: RuleBody } {
  const shown = number === undefined ? (rule.draft ?? rule.inForce ?? rule.versions[0]) : undefined;
  const chosen = shown ?? rule.versions.find((one) => one.number === number);
  if (chosen === undefined) throw new Refusal('version', `This rule has no version ${number ?? 1}.`);
  return chosen;
}

/** Keys there by keys here. A unit must stay what it is: a band in °C means nothing for a point in per cent. */
async function pointsThere(
  holding: Holding,
  rule: FoundRule,
  houseId: string,
  body: RuleBody,
  given: RuleCopy['points'],
): Promise<Map<string, string>> {
  const here = await listPoints(holding, rule.houseId);
  const isSameHouse = houseId === rule.houseId;
  const there = isSameHouse ? here : await listPoints(holding, houseId);
  const named = new Set(pointsOfRule(body));
  const mapped = new Map<string, string>();
  given.forEach(({ from, to }, at) => {
    const own = keyOrId(here, from)?.key ?? from;
    if (!named.has(own)) throw new Refusal(`points.${at}.from`, `The rule names no point ${from}.`);
    if (mapped.has(own)) throw new Refusal(`points.${at}.from`, `${from} is given twice.`);
    const target = keyOrId(there, to);
    if (target === undefined) throw new Refusal(`points.${at}.to`, `The house has no point ${to}.`);
    const unit = here.find((one) => one.key === own)?.unit;
    if (unit !== undefined && unit !== target.unit)
      throw new Refusal(
        `points.${at}.to`,
        `${target.name} is kept in ${target.unit}, but the rule needs a point in ${unit} here.`,
      );
    mapped.set(own, target.key);
  });
  for (const key of named) {
    const stays = isSameHouse && there.some((one) => one.key === key);
    if (!mapped.has(key) && !stays)
      throw new Refusal('points', `Say which point of the house stands for ${key}.`);
  }
  return mapped;
}

const keyOrId = (points: Point[], ref: string): Point | undefined =>
  points.find((one) => one.key === ref || one.id === ref);
