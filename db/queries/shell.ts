import 'server-only';
import { and, asc, count, eq, isNull, or, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { rule, ruleVersion } from '@/db/schema/rule';
import { alarm } from '@/db/schema/watch';
import { house } from '@/db/schema/house';

export interface HouseBadge {
  slug: string;
  name: string;
  /** Standing alarms, of this house or of the holding as a whole. */
  alarms: number;
  /** Rules in force. */
  rules: number;
}

/** What the menus show beside the pages' names. */
export async function readShell(holding: Holding): Promise<HouseBadge[]> {
  const { db, id } = holding;
  const alarms = db
    .select({ many: count() })
    .from(alarm)
    .where(
      and(
        eq(alarm.holdingId, id),
        isNull(alarm.clearedAt),
        or(eq(alarm.houseId, house.id), isNull(alarm.houseId)),
      ),
    );
  const rules = db
    .select({ many: count() })
    .from(rule)
    .innerJoin(ruleVersion, and(eq(ruleVersion.holdingId, rule.holdingId), eq(ruleVersion.ruleId, rule.id)))
    .where(and(eq(rule.holdingId, id), eq(rule.houseId, house.id), eq(ruleVersion.status, 'in-force')));
  return db
    .select({
      slug: house.slug,
      name: house.name,
      alarms: sql<number>`(${alarms})`.mapWith(Number),
      rules: sql<number>`(${rules})`.mapWith(Number),
    })
    .from(house)
    .where(and(eq(house.holdingId, id), isNull(house.removedAt)))
    .orderBy(asc(house.createdAt), asc(house.id));
}
