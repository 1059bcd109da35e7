/** Test readings of boards: asked by the pages, answered by the leading worker, kept for minutes. */
import 'server-only';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import type { Db, Holding } from '@/db/client';
import { node } from '@/db/schema/node';
import { testRead, type KeptAnswer } from '@/db/schema/test-read';
import type { TestRead, TestReadCreate } from '@/lib/schema/bus';
import { isId } from './reference';
import { Refusal } from './refusal';

/** A board that has not answered by then will not: the worker lets the question go. */
const ANSWER_WITHIN = sql`interval '10 seconds'`;
const KEPT_FOR = sql`interval '10 minutes'`;

export interface AskedRead {
  id: string;
  holdingId: string;
  houseId: string;
  nodeId: string;
  ask: Omit<TestReadCreate, 'node'>;
}

/** @throws Refusal for a node that is no board on Modbus, or that nothing is known of */
export async function askTestRead(
  holding: Holding,
  houseId: string,
  { node: ref, ...ask }: TestReadCreate,
): Promise<TestRead> {
  const { db } = holding;
  const [board] = await db
    .select({ id: node.id, key: node.key, kind: node.kind, modbus: node.modbus })
    .from(node)
    .where(
      and(
        eq(node.holdingId, holding.id),
        eq(node.houseId, houseId),
        isNull(node.removedAt),
        isId(ref) ? eq(node.id, ref) : eq(node.key, ref),
      ),
    );
  if (board === undefined) throw new Refusal('node', 'This house has no such node.');
  if (board.kind !== 'modbus') throw new Refusal('node', `${board.key} is no board on Modbus.`);
  if (board.modbus === null) throw new Refusal('node', `How ${board.key} is reached is not told yet.`);
  await db
    .delete(testRead)
    .where(and(eq(testRead.holdingId, holding.id), sql`${testRead.askedAt} < now() - ${KEPT_FOR}`));
  const id = uuid();
  await db
    .insert(testRead)
    .values({ id, holdingId: holding.id, houseId, nodeId: board.id, ask, askedAt: sql`now()` });
  await db.execute(sql`select pg_notify('test_read', ${houseId})`);
  return {
    id,
    node: board.key,
    state: 'asked',
    words: null,
    raw: null,
    value: null,
    unit: ask.unit,
    why: null,
  };
}

export async function findTestRead(holding: Holding, houseId: string, ref: string): Promise<TestRead | null> {
  if (!isId(ref)) return null;
  const [row] = await holding.db
    .select({
      read: testRead,
      node: node.key,
      isOver: sql<boolean>`${testRead.askedAt} < now() - ${ANSWER_WITHIN}`,
    })
    .from(testRead)
    .innerJoin(node, and(eq(node.holdingId, testRead.holdingId), eq(node.id, testRead.nodeId)))
    .where(and(eq(testRead.holdingId, holding.id), eq(testRead.houseId, houseId), eq(testRead.id, ref)));
  if (row === undefined) return null;
  const { id, ask, answer } = row.read;
  const told = { id, node: row.node, unit: ask.unit };
  if (answer !== null) return { ...told, ...answer, state: answer.why === null ? 'answered' : 'failed' };
  const nothing = { words: null, raw: null, value: null };
  return row.isOver
    ? {
        ...told,
        ...nothing,
        state: 'failed',
        why: 'No answer came: the part that speaks to boards is not running.',
      }
    : { ...told, ...nothing, state: 'asked', why: null };
}

/** What waits for an answer, of every holding; for the worker. */
export async function waitingTestReads(db: Db): Promise<AskedRead[]> {
  return db
    .select({
      id: testRead.id,
      holdingId: testRead.holdingId,
      houseId: testRead.houseId,
      nodeId: testRead.nodeId,
      ask: testRead.ask,
    })
    .from(testRead)
    .where(and(isNull(testRead.answer), sql`${testRead.askedAt} > now() - ${ANSWER_WITHIN}`))
    .orderBy(asc(testRead.askedAt));
}

export async function answerTestRead(
  db: Db,
  { id, holdingId }: Pick<AskedRead, 'id' | 'holdingId'>,
  answer: KeptAnswer,
): Promise<void> {
  await db
    .update(testRead)
    .set({ answer })
    .where(and(eq(testRead.holdingId, holdingId), eq(testRead.id, id), isNull(testRead.answer)));
}
