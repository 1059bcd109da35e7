import 'server-only';
import { and, eq, isNull, ne } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { rule, ruleVersion } from '@/db/schema/rule';
import { channel, loop, source } from '@/db/schema/channel';
import { point } from '@/db/schema/node';
import { mapRulePoints } from '@/lib/schema/rule-points';
import { inUse } from './reference';

/** Rule bodies, channels and derived points name a point by its key inside JSON; so a new key goes through all of them. */
export async function renamePoint(
  holding: Holding,
  houseId: string,
  from: string,
  to: string,
): Promise<void> {
  const rename = (key: string) => (key === from ? to : key);
  for (const row of await versionsOf(holding, houseId)) {
    await holding.db
      .update(ruleVersion)
      .set({ body: mapRulePoints(row.body, rename) })
      .where(and(eq(ruleVersion.holdingId, holding.id), eq(ruleVersion.id, row.id)));
  }
  const renamed = <T extends { point: string }>(part: T | null): T | null =>
    part === null ? null : { ...part, point: rename(part.point) };
  for (const row of await holding.db
    .select()
    .from(channel)
    .where(inUse(holding, houseId, channel))) {
    await holding.db
      .update(channel)
      .set({
        highLimit: renamed(row.highLimit),
        runProof: renamed(row.runProof),
        fallback: renamed(row.fallback),
      })
      .where(and(eq(channel.holdingId, holding.id), eq(channel.id, row.id)));
  }
  for (const row of await holding.db
    .select()
    .from(point)
    .where(inUse(holding, houseId, point))) {
    if (row.derived === null) continue;
    await holding.db
      .update(point)
      .set({ derived: { ...row.derived, points: row.derived.points.map(rename) } })
      .where(and(eq(point.holdingId, holding.id), eq(point.id, row.id)));
  }
}

/** What of the house would lose its footing without this point, by name. */
export async function usesOfPoint(
  holding: Holding,
  houseId: string,
  gone: { id: string; key: string },
): Promise<string[]> {
  const uses: string[] = [];
  for (const row of await holding.db
    .select()
    .from(source)
    .where(inUse(holding, houseId, source))) {
    if (row.corePointId === gone.id || row.basePointId === gone.id) uses.push(row.name);
  }
  for (const row of await holding.db
    .select()
    .from(loop)
    .where(inUse(holding, houseId, loop))) {
    if (row.intakePointId === gone.id || row.returnPointId === gone.id) uses.push(row.name);
  }
  for (const row of await holding.db
    .select()
    .from(channel)
    .where(inUse(holding, houseId, channel))) {
    const named = [row.highLimit, row.runProof, row.fallback].some((part) => part?.point === gone.key);
    if (named) uses.push(row.label);
  }
  for (const row of await holding.db
    .select()
    .from(point)
    .where(inUse(holding, houseId, point))) {
    if (row.derived?.points.includes(gone.key) === true) uses.push(row.name);
  }
  for (const row of await versionsOf(holding, houseId)) {
    const named = new Set<string>();
    mapRulePoints(row.body, (key) => {
      named.add(key);
      return key;
    });
    if (named.has(gone.key) && row.status !== 'retired') uses.push(`rule ${row.name}`);
  }
  return [...new Set(uses)];
}

async function versionsOf(holding: Holding, houseId: string) {
  return holding.db
    .select({ id: ruleVersion.id, body: ruleVersion.body, status: ruleVersion.status, name: rule.name })
    .from(ruleVersion)
    .innerJoin(rule, and(eq(rule.holdingId, ruleVersion.holdingId), eq(rule.id, ruleVersion.ruleId)))
    .where(and(eq(rule.holdingId, holding.id), eq(rule.houseId, houseId)));
}

/** What stands on a channel: loops, interlocks are told by their own tables; rules that are not retired, by name. */
export async function rulesOfChannel(holding: Holding, channelId: string): Promise<string[]> {
  const rows = await holding.db
    .selectDistinct({ name: rule.name })
    .from(rule)
    .innerJoin(ruleVersion, and(eq(ruleVersion.holdingId, rule.holdingId), eq(ruleVersion.ruleId, rule.id)))
    .where(
      and(
        eq(rule.holdingId, holding.id),
        eq(rule.channelId, channelId),
        isNull(rule.retiredAt),
        ne(ruleVersion.status, 'retired'),
      ),
    );
  return rows.map((row) => `rule ${row.name}`);
}
