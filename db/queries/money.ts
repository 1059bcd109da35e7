/** Prices of a holding and costs of its heaps, as they were entered. */
import 'server-only';
import { and, desc, eq, isNull, type SQL } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { heapCost, moneyBook } from '@/db/schema/money';
import { source } from '@/db/schema/channel';
import { amountOf, HeapCost, type HeapCostCreate, MoneyBook, type MoneyBookWrite } from '@/lib/schema/money';
import type { House } from '@/lib/schema/yard-view';
import { microsText } from '@/lib/units/money';
import { refuseDayToCome } from './day-done';
import { houseNames, isId } from './reference';

type Place = Pick<House, 'id' | 'zone'>;
interface Act {
  by: string;
  now: Date;
}

const NOTHING_YET: MoneyBook = { revision: 0, currency: null, tariffs: [], fuels: [] };

export async function readMoneyBook(holding: Holding): Promise<MoneyBook> {
  const [row] = await holding.db.select().from(moneyBook).where(eq(moneyBook.holdingId, holding.id));
  return row === undefined ? NOTHING_YET : MoneyBook.parse({ ...row.body, revision: row.revision });
}

/** @returns null where it is no longer the book that was read; callers hold the holding's lock */
export async function writeMoneyBook(
  holding: Holding,
  given: z.infer<typeof MoneyBookWrite>,
  act: Act,
): Promise<MoneyBook | null> {
  const { revision: read, ...body } = given;
  const before = await readMoneyBook(holding);
  if (before.revision !== read) return null;
  const row = { body, revision: read + 1, by: act.by, enteredAt: act.now };
  await holding.db
    .insert(moneyBook)
    .values({ holdingId: holding.id, ...row })
    .onConflictDoUpdate({ target: moneyBook.holdingId, set: row });
  return readMoneyBook(holding);
}

async function select(holding: Holding, houseId: string, only?: SQL): Promise<HeapCost[]> {
  const rows = await holding.db
    .select({ cost: heapCost, slug: source.slug })
    .from(heapCost)
    .innerJoin(source, and(eq(source.holdingId, heapCost.holdingId), eq(source.id, heapCost.sourceId)))
    .where(
      and(eq(heapCost.holdingId, holding.id), eq(source.houseId, houseId), isNull(heapCost.removedAt), only),
    )
    .orderBy(desc(heapCost.paidOn), desc(heapCost.id));
  return rows.map(({ cost: { id, kind, paidOn, text, micros, work, years, by }, slug }) =>
    HeapCost.parse({ id, kind, text, work, years, by, source: slug, on: paidOn, amount: microsText(micros) }),
  );
}

/** Newest first. */
export async function listHeapCosts(holding: Holding, houseId: string, heap?: string): Promise<HeapCost[]> {
  return select(
    holding,
    houseId,
    heap === undefined ? undefined : isId(heap) ? eq(source.id, heap) : eq(source.slug, heap),
  );
}

export async function findHeapCost(holding: Holding, houseId: string, id: string): Promise<HeapCost | null> {
  return isId(id) ? ((await select(holding, houseId, eq(heapCost.id, id)))[0] ?? null) : null;
}

export async function createHeapCost(
  holding: Holding,
  house: Place,
  given: z.infer<typeof HeapCostCreate>,
  act: Act,
): Promise<HeapCost> {
  const id = uuid();
  await holding.db
    .insert(heapCost)
    .values({ holdingId: holding.id, id, ...(await rowOf(holding, house, given, act)) });
  return written(holding, house.id, id);
}

/** As a whole, under the same id; who entered it is from then on who amended it. */
export async function amendHeapCost(
  holding: Holding,
  house: Place,
  id: string,
  given: z.infer<typeof HeapCostCreate>,
  act: Act,
): Promise<HeapCost> {
  await holding.db
    .update(heapCost)
    .set(await rowOf(holding, house, given, act))
    .where(and(eq(heapCost.holdingId, holding.id), eq(heapCost.id, id)));
  return written(holding, house.id, id);
}

/** @throws Refusal at `source` for one that there is not, at `on` for a day yet to come: what was not paid cost nothing yet */
async function rowOf(holding: Holding, house: Place, given: z.infer<typeof HeapCostCreate>, act: Act) {
  refuseDayToCome(given.on, 'on', 'the day on which it was paid or the work was done', house, act.now);
  const sourceId = (await houseNames(holding, house.id)).sources.find(given.source, 'source').id;
  const { kind, text, work, years } = given;
  const micros = amountOf(given);
  if (micros === null) throw new Error('the schema lets no cost through that has no amount');
  return { sourceId, kind, text, micros, work, years, paidOn: given.on, by: act.by, enteredAt: act.now };
}

async function written(holding: Holding, houseId: string, id: string): Promise<HeapCost> {
  const cost = await findHeapCost(holding, houseId, id);
  if (cost === null) throw new Error('the cost was written and did not come back');
  return cost;
}

export async function removeHeapCost(holding: Holding, id: string, now: Date): Promise<void> {
  await holding.db
    .update(heapCost)
    .set({ removedAt: now })
    .where(and(eq(heapCost.holdingId, holding.id), eq(heapCost.id, id)));
}
