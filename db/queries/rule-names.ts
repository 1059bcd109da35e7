import { and, eq } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { rule } from '@/db/schema/rule';

/** What a rule is called, retired ones included; null where it is gone. */
export async function ruleNames(
  holding: Holding,
  id: string,
): Promise<{ id: string; slug: string; name: string } | null> {
  const [row] = await holding.db
    .select({ id: rule.id, slug: rule.slug, name: rule.name })
    .from(rule)
    .where(and(eq(rule.holdingId, holding.id), eq(rule.id, id)));
  return row ?? null;
}
