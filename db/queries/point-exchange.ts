import 'server-only';
import { and, eq, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Holding } from '@/db/client';
import { loop, source } from '@/db/schema/channel';
import { attachment } from '@/db/schema/heap';
import { point } from '@/db/schema/node';
import type { Point } from '@/lib/schema/yard-view';
import { touchPlan } from './plan';
import { renamePoint } from './point-uses';
import { inUse } from './reference';
import { Refusal } from './refusal';

/**
 * Two probes were wired the wrong way round: what came under one key is of the other's place. The keys are the node's and
 * stay, with the readings, the range, the sensor and the calibration, which are the probe's. What is the place's changes
 * sides: name, role, how fast it may change, photographs, and whatever names the point: sources, loops, channels, rules
 * and derived points go on meaning the same place.
 * @throws Refusal at `with` for points that cannot have been confused: of two nodes, two units, or derived ones
 */
export async function exchangePlaces(
  holding: Holding,
  houseId: string,
  one: Point,
  other: Point,
): Promise<void> {
  refuseStrangers(one, other);
  const between = `exchange-${uuid()}`;
  await renamePoint(holding, houseId, one.key, between);
  await renamePoint(holding, houseId, other.key, one.key);
  await renamePoint(holding, houseId, between, other.key);
  await exchangeIds(holding, houseId, one.id, other.id);
  const placeOf = ({ name, role, maxRate, frozenAfter }: Point) => ({
    ...{ name, role, maxRate },
    frozenAfterS: frozenAfter,
  });
  for (const [id, place] of [
    [one.id, placeOf(other)],
    [other.id, placeOf(one)],
  ] as const)
    await holding.db
      .update(point)
      .set({ ...place, revision: sql`${point.revision} + 1` })
      .where(and(eq(point.holdingId, holding.id), eq(point.id, id)));
  await touchPlan(holding, houseId);
}

function refuseStrangers(one: Point, other: Point): void {
  if (one.id === other.id) throw new Refusal('with', 'Name the other of the two points.');
  if (one.derived !== null || other.derived !== null)
    throw new Refusal('with', 'A derived point has no probe that could be wired the wrong way round.');
  if (one.node !== other.node)
    throw new Refusal(
      'with',
      'These two are wired to two nodes: plug the probes in at the right node instead.',
    );
  if (one.unit !== other.unit)
    throw new Refusal(
      'with',
      `One is kept in ${one.unit}, the other in ${other.unit}: they cannot be confused.`,
    );
}

async function exchangeIds(holding: Holding, houseId: string, one: string, other: string): Promise<void> {
  const turned = (id: string | null) => (id === one ? other : id === other ? one : id);
  for (const row of await holding.db
    .select()
    .from(source)
    .where(inUse(holding, houseId, source)))
    await holding.db
      .update(source)
      .set({ corePointId: turned(row.corePointId), basePointId: turned(row.basePointId) })
      .where(and(eq(source.holdingId, holding.id), eq(source.id, row.id)));
  for (const row of await holding.db
    .select()
    .from(loop)
    .where(inUse(holding, houseId, loop)))
    await holding.db
      .update(loop)
      .set({
        intakePointId: turned(row.intakePointId) ?? row.intakePointId,
        returnPointId: turned(row.returnPointId) ?? row.returnPointId,
      })
      .where(and(eq(loop.holdingId, holding.id), eq(loop.id, row.id)));
  await holding.db
    .update(attachment)
    .set({
      pointId: sql`case when ${attachment.pointId} = ${one}::uuid then ${other}::uuid else ${one}::uuid end`,
    })
    .where(
      and(eq(attachment.holdingId, holding.id), sql`${attachment.pointId} in (${one}::uuid, ${other}::uuid)`),
    );
}
