import 'server-only';
import { and, asc, desc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { rule, ruleVersion } from '@/db/schema/rule';
import { channel } from '@/db/schema/channel';
import { house } from '@/db/schema/house';
import type { RuleBody } from '@/lib/schema/rule';
import { mapRulePoints } from '@/lib/schema/rule-points';
import type { Rule, RuleVersion, RuleWithVersions } from '@/lib/schema/rule-view';
import { houseNames, isId } from './reference';
import { freeSlug } from './slug';

/** Rules as people read and write them; how versions pass into and out of force stands in rule-version.ts. */
const headFields = {
  id: rule.id,
  houseId: rule.houseId,
  revision: rule.revision,
  slug: rule.slug,
  name: rule.name,
  house: house.slug,
  channel: channel.key,
  channelId: rule.channelId,
  retiredAt: rule.retiredAt,
  copiedFrom: rule.copiedFrom,
};
interface Head {
  id: string;
  houseId: string;
  revision: number;
  slug: string;
  name: string;
  house: string;
  channel: string;
  channelId: string;
  retiredAt: Date | null;
  copiedFrom: { rule: string; version: number } | null;
}
/** With what the routes need beside the answer: whose house and channel. */
export interface FoundRule extends RuleWithVersions {
  houseId: string;
  channelId: string;
}

async function heads(holding: Holding, only: ReturnType<typeof eq> | undefined): Promise<Head[]> {
  return holding.db
    .select(headFields)
    .from(rule)
    .innerJoin(house, and(eq(house.holdingId, rule.holdingId), eq(house.id, rule.houseId)))
    .innerJoin(channel, and(eq(channel.holdingId, rule.holdingId), eq(channel.id, rule.channelId)))
    .where(and(eq(rule.holdingId, holding.id), isNull(house.removedAt), only))
    .orderBy(asc(rule.createdAt), asc(rule.id));
}

export function toVersion(row: typeof ruleVersion.$inferSelect): RuleVersion {
  const { id, number, status, body, why, by } = row;
  return {
    ...{ id, number, status, body, why, by },
    draftedAt: row.draftedAt.toISOString(),
    forcedAt: row.forcedAt?.toISOString() ?? null,
    endedAt: row.endedAt?.toISOString() ?? null,
    ...{ endedBy: row.endedBy, endedWhy: row.endedWhy, unproved: row.unproved },
  };
}

async function withVersions(holding: Holding, head: Head): Promise<FoundRule> {
  const rows = await holding.db
    .select()
    .from(ruleVersion)
    .where(and(eq(ruleVersion.holdingId, holding.id), eq(ruleVersion.ruleId, head.id)))
    .orderBy(desc(ruleVersion.number));
  const versions = rows.map(toVersion);
  const draft = versions.find((row) => row.status === 'draft') ?? null;
  const inForce = versions.find((row) => row.status === 'in-force') ?? null;
  const shown = draft ?? inForce ?? versions[0];
  if (shown === undefined) throw new Error(`rule ${head.id} has no version`);
  return {
    ...head,
    ...{ body: shown.body, draft, inForce, versions },
    retiredAt: head.retiredAt?.toISOString() ?? null,
    retired: retirement(head.retiredAt, versions),
    copiedFrom: await originOf(holding, head.copiedFrom),
  };
}

/** Its versions keep who ended them and why, also after it was brought back; the last of them is the retirement's. */
function retirement(at: Date | null, versions: RuleVersion[]): Rule['retired'] {
  if (at === null) return null;
  const ended = versions.find((version) => version.endedAt === at.toISOString());
  return { at: at.toISOString(), by: ended?.endedBy ?? null, why: ended?.endedWhy ?? null };
}

/** Null also where that rule went with its house. */
async function originOf(holding: Holding, from: Head['copiedFrom']): Promise<Rule['copiedFrom']> {
  if (from === null) return null;
  const origin = (await heads(holding, eq(rule.id, from.rule)))[0];
  return origin === undefined
    ? null
    : { rule: origin.slug, name: origin.name, house: origin.house, version: from.version };
}

/** The rule without what only its own page shows. */
export function toRule(found: FoundRule): Rule {
  const { id, revision, slug, name, house, channel, body, draft, inForce } = found;
  const { retiredAt, retired, copiedFrom } = found;
  return {
    ...{ id, revision, slug, name, house, channel, body, draft, inForce },
    ...{ retiredAt, retired, copiedFrom },
  };
}

export function toRuleWithVersions(found: FoundRule): RuleWithVersions {
  return { ...toRule(found), versions: found.versions };
}

export async function listRules(holding: Holding, houseId: string, withRetired = false): Promise<Rule[]> {
  const all = await heads(
    holding,
    and(eq(rule.houseId, houseId), withRetired ? undefined : isNull(rule.retiredAt)),
  );
  const found: Rule[] = [];
  for (const head of all) found.push(toRule(await withVersions(holding, head)));
  return found;
}

/** By id or slug, which is the holding's; retired ones too, so that their versions can be read and brought back. */
export async function findRule(holding: Holding, ref: string): Promise<FoundRule | null> {
  const head = (await heads(holding, isId(ref) ? eq(rule.id, ref) : eq(rule.slug, ref)))[0];
  return head === undefined ? null : withVersions(holding, head);
}

/** @throws Refusal at the path of a point that this house does not have */
export async function resolveBody(holding: Holding, houseId: string, body: RuleBody): Promise<RuleBody> {
  const { points } = await houseNames(holding, houseId);
  return mapRulePoints(body, (ref, path) => points.find(ref, path).key);
}

interface Act {
  by: string;
  now: Date;
}

export async function createRule(
  holding: Holding,
  houseId: string,
  given: { name: string; channel: string; body: RuleBody },
  act: Act,
): Promise<FoundRule> {
  const { points, channels } = await houseNames(holding, houseId);
  const channelId = channels.find(given.channel, 'channel').id;
  // The body stands one deeper here than in PUT draft, and so do its paths.
  const body = mapRulePoints(given.body, (ref, path) => points.find(ref, `body.${path}`).key);
  return addRule(holding, { houseId, channelId, name: given.name, body, copiedFrom: null }, act);
}

/** Writes a rule with its first draft; all names in it are found already. */
export async function addRule(
  holding: Holding,
  given: Pick<Head, 'houseId' | 'channelId' | 'name' | 'copiedFrom'> & { body: RuleBody },
  act: Act,
): Promise<FoundRule> {
  const { body, ...head } = given;
  const taken = await holding.db.select({ slug: rule.slug }).from(rule).where(eq(rule.holdingId, holding.id));
  const id = uuid();
  await holding.db.insert(rule).values({
    ...{ ...head, id, holdingId: holding.id, createdAt: act.now },
    slug: freeSlug(head.name, new Set(taken.map((row) => row.slug))),
  });
  await holding.db.insert(ruleVersion).values({
    ...{ id: uuid(), holdingId: holding.id, ruleId: id, number: 1, status: 'draft', body, by: act.by },
    draftedAt: act.now,
  });
  return again(holding, id);
}

export async function renameRule(holding: Holding, id: string, name: string): Promise<FoundRule> {
  await holding.db
    .update(rule)
    .set({ name })
    .where(and(eq(rule.holdingId, holding.id), eq(rule.id, id)));
  await touchRule(holding, id, {});
  return again(holding, id);
}

/** Counts a change, so that whoever still has the former state in hand is told. */
export async function touchRule(
  holding: Holding,
  id: string,
  set: { retiredAt?: Date | null },
): Promise<void> {
  await holding.db
    .update(rule)
    .set({ ...set, revision: sql`${rule.revision} + 1` })
    .where(and(eq(rule.holdingId, holding.id), eq(rule.id, id)));
}

export async function again(holding: Holding, id: string): Promise<FoundRule> {
  const found = await findRule(holding, id);
  if (found === null) throw new Error('the rule was there a moment ago');
  return found;
}
