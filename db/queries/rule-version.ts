import 'server-only';
import { and, eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { rule as rules, ruleVersion } from '@/db/schema/rule';
import type { RuleBody } from '@/lib/schema/rule';
import type { RuleVersion } from '@/lib/schema/rule-view';
import { touchPlan } from './plan';
import { houseNames } from './reference';
import { Refusal } from './refusal';
import { again, resolveBody, touchRule, type FoundRule } from './rule';

interface Act {
  by: string;
  now: Date;
}

const mine = (holding: Holding, id: string) =>
  and(eq(ruleVersion.holdingId, holding.id), eq(ruleVersion.id, id));

/** Writes the draft; the version in force is never touched by it. */
export async function writeDraft(
  holding: Holding,
  rule: FoundRule,
  given: RuleBody,
  act: Act,
): Promise<FoundRule> {
  return writeDraftAsIs(holding, rule, await resolveBody(holding, rule.houseId, given), act);
}

/** A body of old may name a point that is no longer there: as a draft it is kept, and the check says what it lacks. */
async function writeDraftAsIs(
  holding: Holding,
  rule: FoundRule,
  body: RuleBody,
  act: Act,
): Promise<FoundRule> {
  if (rule.draft === null) {
    await holding.db.insert(ruleVersion).values({
      ...{ id: uuid(), holdingId: holding.id, ruleId: rule.id, status: 'draft', body, by: act.by },
      number: (rule.versions[0]?.number ?? 0) + 1,
      draftedAt: act.now,
    });
  } else {
    await holding.db
      .update(ruleVersion)
      .set({ body, by: act.by, draftedAt: act.now })
      .where(mine(holding, rule.draft.id));
  }
  await touchRule(holding, rule.id, {});
  return again(holding, rule.id);
}

/** Throws the draft away; a rule that never was in force keeps its only version, as retired. */
export async function dropDraft(holding: Holding, rule: FoundRule, act: Act): Promise<void> {
  if (rule.draft === null) throw new Refusal(null, 'This rule has no draft.');
  if (rule.versions.length === 1) {
    await endVersion(holding, rule.draft.id, act, null);
    await touchRule(holding, rule.id, { retiredAt: act.now });
    return;
  }
  await holding.db.delete(ruleVersion).where(mine(holding, rule.draft.id));
  await touchRule(holding, rule.id, {});
}

/**
 * The draft takes the place of what was in force, at once and in one transaction.
 * @param unproved where nobody has proved its channel: that this was accepted, and in which words
 */
export async function forceDraft(
  holding: Holding,
  rule: FoundRule,
  why: string,
  act: Act,
  unproved: { words: string | null } | null,
): Promise<RuleVersion> {
  const { draft, inForce } = rule;
  if (draft === null) throw new Refusal(null, 'This rule has no draft to put into force.');
  if (inForce !== null) await endVersion(holding, inForce.id, act, null);
  await holding.db
    .update(ruleVersion)
    .set({
      ...{ status: 'in-force', why, by: act.by, forcedAt: act.now },
      unproved: unproved === null ? null : { by: act.by, at: act.now.toISOString(), words: unproved.words },
    })
    .where(mine(holding, draft.id));
  await touchRule(holding, rule.id, { retiredAt: null });
  await touchPlan(holding, rule.houseId);
  const forced = (await again(holding, rule.id)).inForce;
  if (forced === null) throw new Error('the version was put into force and is not');
  return forced;
}

export async function retireRule(
  holding: Holding,
  rule: FoundRule,
  why: string,
  act: Act,
): Promise<FoundRule> {
  if (rule.retiredAt !== null) throw new Refusal(null, 'This rule is retired already.');
  for (const version of [rule.draft, rule.inForce]) {
    if (version !== null) await endVersion(holding, version.id, act, why);
  }
  await touchRule(holding, rule.id, { retiredAt: act.now });
  await touchPlan(holding, rule.houseId);
  return again(holding, rule.id);
}

/** An older version's body becomes the draft; it is looked at and put into force like any other. */
export async function goBack(
  holding: Holding,
  rule: FoundRule,
  number: number,
  act: Act,
): Promise<FoundRule> {
  const older = rule.versions.find((version) => version.number === number);
  if (older === undefined) throw new Refusal('version', `This rule has no version ${number}.`);
  return writeDraft(holding, rule, older.body, act);
}

/**
 * Brings a retired rule back as a draft of what it last said while it was in force (else last of all), or of a version
 * that is named. Nothing is put into force by it: the yard may have changed since, so a person looks first.
 */
export async function restoreRule(
  holding: Holding,
  rule: FoundRule,
  number: number | undefined,
  act: Act,
): Promise<FoundRule> {
  if (rule.retiredAt === null) throw new Refusal(null, 'This rule is not retired.');
  const { channels } = await houseNames(holding, rule.houseId);
  if (!channels.has(rule.channelId))
    throw new Refusal(
      null,
      'The channel of this rule was taken out of use. Copy the rule to another channel instead.',
    );
  const chosen =
    number === undefined
      ? (rule.versions.find((version) => version.forcedAt !== null) ?? rule.versions[0])
      : rule.versions.find((version) => version.number === number);
  if (chosen === undefined) throw new Refusal('version', `This rule has no version ${number ?? 1}.`);
  await holding.db
    .update(rules)
    .set({ retiredAt: null })
    .where(and(eq(rules.holdingId, holding.id), eq(rules.id, rule.id)));
  return writeDraftAsIs(holding, rule, chosen.body, act);
}

async function endVersion(holding: Holding, id: string, act: Act, why: string | null): Promise<void> {
  await holding.db
    .update(ruleVersion)
    .set({ status: 'retired', endedAt: act.now, endedBy: act.by, endedWhy: why })
    .where(mine(holding, id));
}
