/** What control did and how it stands: written by the worker in batches, read by pages and the interface. */
import { and, asc, desc, eq, gte, inArray, lt, or, sql } from 'drizzle-orm';
import type { Db, Holding } from '@/db/client';
import { nodeLog } from '@/db/schema/node-log';
import { controlMemory, decision, relayReport, switching } from '@/db/schema/running';
import type { Explanation } from '@/lib/control/events';
import type { State } from '@/lib/control/types';
import type { HouseState } from '@/lib/schema/house-state';

export type SwitchingRow = typeof switching.$inferInsert;
export type DecisionRow = typeof decision.$inferInsert;
export type RelayReportRow = typeof relayReport.$inferInsert;
export type NodeLogRow = typeof nodeLog.$inferInsert;
export type MemoryRow = typeof controlMemory.$inferInsert;

/** Rows of any number of houses and holdings, in the order in which they came to be. */
export interface RunningBatch {
  switchings: SwitchingRow[];
  decisions: DecisionRow[];
  reports: RelayReportRow[];
  /** What nodes said of themselves. */
  logs?: NodeLogRow[];
  /** One a house at most: the newest. */
  memories: MemoryRow[];
}

/**
 * Keeps a batch in one transaction, so that a memory never knows of a switching that is not stored, nor the other way
 * round. Safe to repeat: what is there already stays.
 */
export async function writeRunning(db: Db, batch: RunningBatch): Promise<void> {
  const { switchings, decisions, reports, logs = [], memories } = batch;
  const isQuiet =
    memories.length > 0 && switchings.length + decisions.length + reports.length + logs.length === 0;
  // most often nothing happened but readings: one statement is a transaction by itself
  if (isQuiet && memories.every(isStateAlone)) return writeMemories(db, memories);
  await db.transaction(async (tx) => {
    if (switchings.length > 0) await tx.insert(switching).values(switchings).onConflictDoNothing();
    if (decisions.length > 0) await tx.insert(decision).values(decisions).onConflictDoNothing();
    if (reports.length > 0) await tx.insert(relayReport).values(reports).onConflictDoNothing();
    if (logs.length > 0) await tx.insert(nodeLog).values(logs).onConflictDoNothing();
    await writeMemories(tx, memories);
  });
}

/** Nothing happened in the house but readings. */
const isStateAlone = ({ state, stateAt, ...rest }: MemoryRow): boolean =>
  state !== undefined && stateAt !== undefined && Object.keys(rest).length === 2;

const STATE_COLUMNS = [
  ['state', 'jsonb', (row: MemoryRow) => row.state],
  ['state_at', 'timestamptz', (row: MemoryRow) => row.stateAt],
] as const;
const ALL_COLUMNS = [
  ...STATE_COLUMNS,
  ['memory', 'jsonb', (row: MemoryRow) => row.memory],
  ['memory_at', 'timestamptz', (row: MemoryRow) => row.memoryAt],
  ['taken', 'bigint', (row: MemoryRow) => row.taken],
  ['plan_revision', 'bigint', (row: MemoryRow) => row.planRevision],
  ['epoch', 'bigint', (row: MemoryRow) => row.epoch],
] as const;
type Columns = typeof STATE_COLUMNS | typeof ALL_COLUMNS;

async function writeMemories(db: Db, rows: MemoryRow[]): Promise<void> {
  const isWhole = (row: MemoryRow) => ALL_COLUMNS.every(([, , of]) => of(row) !== undefined);
  await writeTold(db, rows.filter(isStateAlone), STATE_COLUMNS);
  await writeTold(db, rows.filter(isWhole), ALL_COLUMNS);
  for (const row of rows.filter((one) => !isStateAlone(one) && !isWhole(one))) {
    const { holdingId: _holding, houseId: _house, ...changed } = row;
    await db
      .insert(controlMemory)
      .values(row)
      .onConflictDoUpdate({ target: [controlMemory.holdingId, controlMemory.houseId], set: changed });
  }
}

/** Each house is written at each report: a statement a house would cost many times what the rows do. */
async function writeTold(db: Db, rows: MemoryRow[], columns: Columns): Promise<void> {
  if (rows.length === 0) return;
  const told = rows.map((row) => ({
    ...{ holding_id: row.holdingId, house_id: row.houseId },
    ...Object.fromEntries(columns.map(([name, , of]) => [name, of(row)])),
  }));
  const names = sql.raw(columns.map(([name]) => name).join(', '));
  const types = sql.raw(columns.map(([name, type]) => `${name} ${type}`).join(', '));
  const changes = sql.raw(columns.map(([name]) => `${name} = excluded.${name}`).join(', '));
  await db.execute(sql`
    insert into control_memory (holding_id, house_id, ${names})
    select holding_id, house_id, ${names} from jsonb_to_recordset(${JSON.stringify(told)}::jsonb)
      as told(holding_id uuid, house_id uuid, ${types})
    on conflict (holding_id, house_id) do update set ${changes}`);
}

export interface KeptMemory {
  memory: Record<string, unknown> | null;
  memoryAt: number | null;
  taken: number;
  planRevision: number;
  state: HouseState | null;
  stateAt: number | null;
}

export async function readMemory(holding: Holding, houseId: string): Promise<KeptMemory | null> {
  const [row] = await holding.db
    .select()
    .from(controlMemory)
    .where(and(eq(controlMemory.holdingId, holding.id), eq(controlMemory.houseId, houseId)));
  if (row === undefined) return null;
  return {
    memory: row.memory,
    memoryAt: row.memoryAt?.getTime() ?? null,
    taken: row.taken,
    planRevision: row.planRevision,
    // Written by the worker in this very shape, and by nobody else.
    state: row.state as HouseState | null,
    stateAt: row.stateAt?.getTime() ?? null,
  };
}

export interface Switching {
  id: string;
  channelId: string;
  at: number;
  from: State;
  to: State;
  claim: string;
  number: number | null;
  ruleId: string | null;
  version: number | null;
  explanation: Explanation;
}

/** Where a list was left: the time and id of its last item. */
export interface SwitchingCursor {
  at: number;
  id: string;
}

/** Newest first. */
export async function listSwitchings(
  holding: Holding,
  houseId: string,
  ask: { from?: number; to?: number; channelIds?: string[]; before?: SwitchingCursor; limit: number },
): Promise<Switching[]> {
  const rows = await holding.db
    .select()
    .from(switching)
    .where(
      and(
        eq(switching.holdingId, holding.id),
        eq(switching.houseId, houseId),
        ask.from === undefined ? undefined : gte(switching.at, new Date(ask.from)),
        ask.to === undefined ? undefined : lt(switching.at, new Date(ask.to)),
        ask.channelIds === undefined ? undefined : inArray(switching.channelId, ask.channelIds),
        ask.before === undefined
          ? undefined
          : or(
              lt(switching.at, new Date(ask.before.at)),
              and(eq(switching.at, new Date(ask.before.at)), lt(switching.id, ask.before.id)),
            ),
      ),
    )
    .orderBy(desc(switching.at), desc(switching.id))
    .limit(ask.limit);
  return rows.map(asSwitching);
}

export function asSwitching(row: typeof switching.$inferSelect): Switching {
  const { id, channelId, from, to, claim, number, ruleId, version, explanation } = row;
  return { id, channelId, at: row.at.getTime(), from, to, claim, number, ruleId, version, explanation };
}

export interface RelayReport {
  channelId: string;
  at: number;
  state: State;
  number: number;
}

/** What relays said of their loads, ascending, led by the report of each channel that stood at `from`. */
export async function listRelayReports(
  holding: Holding,
  channelIds: readonly string[],
  from: number,
  to: number,
): Promise<RelayReport[]> {
  if (channelIds.length === 0) return [];
  const mine = and(eq(relayReport.holdingId, holding.id), inArray(relayReport.channelId, [...channelIds]));
  const standing = await holding.db
    .selectDistinctOn([relayReport.channelId])
    .from(relayReport)
    .where(and(mine, lt(relayReport.at, new Date(from))))
    .orderBy(relayReport.channelId, desc(relayReport.at), desc(relayReport.id));
  const during = await holding.db
    .select()
    .from(relayReport)
    .where(and(mine, gte(relayReport.at, new Date(from)), lt(relayReport.at, new Date(to))))
    .orderBy(asc(relayReport.at), asc(relayReport.id));
  return [...standing, ...during].map((row) => ({
    channelId: row.channelId,
    at: row.at.getTime(),
    state: row.state,
    number: row.number,
  }));
}

/** A node's text may hold what no database keeps; it must not keep the notes of all others from being written. */
export const storableText = (text: string): string => text.replace(/[\0\p{Surrogate}]/gu, '\ufffd');
const storable = (_key: string, value: unknown): unknown =>
  typeof value === 'string' ? storableText(value) : value;

/** Rows of one statement: a thousand nodes are not held up by one another's locks for long. */
const NODES_A_STATEMENT = 500;

/** What the link last knew of each node, for the wiring page and for a restarted worker. */
export async function writeNodeStatus(
  db: Db,
  nodes: readonly {
    id: string;
    holdingId: string;
    lastHeardAt: number | null;
    status: Record<string, unknown>;
  }[],
): Promise<void> {
  for (let first = 0; first < nodes.length; first += NODES_A_STATEMENT) {
    const told = nodes
      .slice(first, first + NODES_A_STATEMENT)
      .map(({ id, holdingId, lastHeardAt, status }) => ({
        holding_id: holdingId,
        id,
        status,
        heard_at: lastHeardAt === null ? null : new Date(lastHeardAt),
      }));
    await db.execute(sql`
      update node set status = told.status, last_heard_at = coalesce(told.heard_at, node.last_heard_at)
      from jsonb_to_recordset(${JSON.stringify(told, storable)}::jsonb)
        as told(holding_id uuid, id uuid, status jsonb, heard_at timestamptz)
      where node.holding_id = told.holding_id and node.id = told.id`);
  }
}
