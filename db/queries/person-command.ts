/** What people ordered: written by the interface, taken once each by the core. */
import { and, asc, eq, gt, max, sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { controlMemory, personCommand } from '@/db/schema/running';
import type { PersonCommand } from '@/lib/control/types';

/** A command without what this file gives it: its number. */
export type PersonOrder = PersonCommand extends infer One
  ? One extends PersonCommand
    ? Omit<One, 'number'>
    : never
  : never;

/**
 * Numbers and keeps a command, and wakes the worker. To be called inside a transaction: two people who press at once get
 * two numbers.
 * @returns its number
 */
export async function addPersonCommand(
  holding: Holding,
  houseId: string,
  order: PersonOrder,
): Promise<number> {
  const { db } = holding;
  await db.execute(sql`select pg_advisory_xact_lock(hashtext(${houseId}))`);
  const mine = and(eq(personCommand.holdingId, holding.id), eq(personCommand.houseId, houseId));
  const [last] = await db
    .select({ number: max(personCommand.number) })
    .from(personCommand)
    .where(mine);
  const number = (last?.number ?? 0) + 1;
  const { at, by, ...body } = order;
  await db
    .insert(personCommand)
    .values({ holdingId: holding.id, houseId, number, at: new Date(at), by, body });
  await db.execute(sql`select pg_notify('command', ${houseId})`);
  return number;
}

/** Commands after a number, in order. */
export async function personCommandsAfter(
  holding: Holding,
  houseId: string,
  after: number,
): Promise<PersonCommand[]> {
  const rows = await holding.db
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
  // The body was checked by the route's schema before addPersonCommand kept it.
  return rows.map(
    (row) => ({ ...row.body, number: row.number, at: row.at.getTime(), by: row.by }) as PersonCommand,
  );
}

/** Whether the core has taken the command of this number, and kept that it did. */
export async function isCommandTaken(holding: Holding, houseId: string, number: number): Promise<boolean> {
  const [row] = await holding.db
    .select({ taken: controlMemory.taken })
    .from(controlMemory)
    .where(and(eq(controlMemory.holdingId, holding.id), eq(controlMemory.houseId, houseId)));
  return row !== undefined && row.taken >= number;
}
