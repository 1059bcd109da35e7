import 'server-only';
import { and, eq, gt, asc, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { controlMemory, personCommand } from '@/db/schema/running';
import { house } from '@/db/schema/house';
import type { PersonCommand } from '@/lib/control/types';
import { Refusal } from './refusal';

type Body<C = PersonCommand> = C extends PersonCommand ? Omit<C, 'number' | 'at' | 'by'> : never;

/**
 * Writes down what a person orders and wakes the worker, whose core takes each number once.
 * @returns its number in the house
 * @throws Refusal for a house that is laid up: an order that nobody takes would be carried out when it is put in service
 */
export async function addPersonCommand(
  holding: Holding,
  houseId: string,
  order: { at: Date; by: string; body: Body },
): Promise<number> {
  const [row] = await holding.db
    .select({ laidUpAt: house.laidUpAt })
    .from(house)
    .where(and(eq(house.holdingId, holding.id), eq(house.id, houseId)));
  if (row !== undefined && row.laidUpAt !== null)
    throw new Refusal(
      null,
      'This house is laid up, so nothing drives it; an owner puts it in service first.',
    );
  // Two orders at once must not get one number, nor the later one commit first and hide the earlier.
  await holding.db.execute(sql`select pg_advisory_xact_lock(hashtext(${houseId}))`);
  const rows = await holding.db
    .select({ last: sql<number>`coalesce(max(${personCommand.number}), 0)`.mapWith(Number) })
    .from(personCommand)
    .where(and(eq(personCommand.holdingId, holding.id), eq(personCommand.houseId, houseId)));
  const number = (rows[0]?.last ?? 0) + 1;
  await holding.db.insert(personCommand).values({ ...order, number, houseId, holdingId: holding.id });
  await holding.db.execute(sql`select pg_notify('command', ${houseId})`);
  return number;
}

/** Greatest number that the core has taken in this house. */
export async function takenCommand(holding: Holding, houseId: string): Promise<number> {
  const rows = await holding.db
    .select({ taken: controlMemory.taken })
    .from(controlMemory)
    .where(and(eq(controlMemory.holdingId, holding.id), eq(controlMemory.houseId, houseId)));
  return rows[0]?.taken ?? 0;
}

/** Orders behind a number, in order. */
export async function listPersonCommands(holding: Holding, houseId: string, after: number) {
  return holding.db
    .select()
    .from(personCommand)
    .where(
      and(
        eq(personCommand.holdingId, holding.id),
        eq(personCommand.houseId, houseId),
        gt(personCommand.number, after),
      ),
    )
    .orderBy(asc(personCommand.number));
}
