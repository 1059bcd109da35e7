/** What people ordered and the core has not taken yet: the worker's side of `person-command.ts`. */
import { and, asc, eq, gt, sql } from 'drizzle-orm';
import type { Db, Holding } from '@/db/client';
import { controlMemory, personCommand } from '@/db/schema/running';
import type { PersonCommand } from '@/lib/control/types';

/** Commands after a number, in order. */
export async function commandsAfter(
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
  // The body's shape is that of addPersonCommand, the one place that writes it.
  return rows.map(
    (row) => ({ ...row.body, number: row.number, at: row.at.getTime(), by: row.by }) as PersonCommand,
  );
}

/** Houses in which a command waits, as far as the core's kept memory tells. */
export async function housesWithCommands(db: Db): Promise<string[]> {
  const rows = await db
    .selectDistinct({ id: personCommand.houseId })
    .from(personCommand)
    .leftJoin(
      controlMemory,
      and(
        eq(controlMemory.holdingId, personCommand.holdingId),
        eq(controlMemory.houseId, personCommand.houseId),
      ),
    )
    .where(gt(personCommand.number, sql`coalesce(${controlMemory.taken}, 0)`));
  return rows.map((row) => row.id);
}
