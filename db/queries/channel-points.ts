import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { point } from '@/db/schema/node';
import { inUse, type Named } from './reference';
import { Refusal } from './refusal';

/** What a fan that runs changes. A temperature or a gas moves for other reasons, and would pass for a run. */
const RUN_ROLES: readonly string[] = ['current', 'power', 'voltage', 'pressure', 'contact', 'other'];

/** @throws Refusal at a point whose role shows no run */
export async function ofARun<T extends { point: string }>(
  holding: Holding,
  houseId: string,
  proof: T | null,
): Promise<T | null> {
  if (proof === null) return null;
  const [by] = await holding.db
    .select({ role: point.role })
    .from(point)
    .where(and(inUse(holding, houseId, point), eq(point.key, proof.point)));
  if (by !== undefined && !RUN_ROLES.includes(by.role)) {
    const why = `A run is seen by current, power, voltage, pressure or a contact; ${proof.point} is ${by.role}.`;
    throw new Refusal('runProof.point', why);
  }
  return proof;
}

/** A node runs a fallback by its own sensors, since it hears of no other. @throws Refusal at the point that is none of them */
export async function ofOwnNode<T extends { point: string }>(
  holding: Holding,
  node: Named,
  fallback: T | null,
): Promise<T | null> {
  if (fallback === null) return null;
  const [own] = await holding.db
    .select({ unit: point.unit })
    .from(point)
    .where(
      and(
        eq(point.holdingId, holding.id),
        eq(point.nodeId, node.id),
        eq(point.key, fallback.point),
        isNull(point.removedAt),
      ),
    );
  if (own === undefined) {
    const why = `Node ${node.key} does not measure ${fallback.point}: it runs a fallback by its own points alone.`;
    throw new Refusal('fallback.point', why);
  }
  if (own.unit !== 'Cel')
    throw new Refusal(
      'fallback.point',
      `A fallback goes by a temperature; ${fallback.point} is in ${own.unit}.`,
    );
  return fallback;
}
