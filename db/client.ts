import 'server-only';
import { sql } from 'drizzle-orm';
import { drizzle, type NodePgQueryResultHKT } from 'drizzle-orm/node-postgres';
import type { PgDatabase } from 'drizzle-orm/pg-core';
import pg from 'pg';
import { env } from '@/lib/server/env';
import * as archive from './schema/archive';
import * as auth from './schema/auth';
import * as channel from './schema/channel';
import * as heap from './schema/heap';
import * as house from './schema/house';
import * as node from './schema/node';
import * as money from './schema/money';
import * as people from './schema/people';
import * as proof from './schema/proof';
import * as report from './schema/report';
import * as rule from './schema/rule';
import * as nodeLog from './schema/node-log';
import * as running from './schema/running';
import * as study from './schema/study';
import * as testRead from './schema/test-read';
import * as watch from './schema/watch';

export const schema = {
  ...archive,
  ...auth,
  ...channel,
  ...heap,
  ...house,
  ...node,
  ...money,
  ...people,
  ...proof,
  ...report,
  ...rule,
  ...nodeLog,
  ...running,
  ...study,
  ...testRead,
  ...watch,
};
/** The pool's handle, or that of one transaction. */
export type Db = PgDatabase<NodePgQueryResultHKT, typeof schema>;

/**
 * A holding to query in. Every query of tenant tables takes it first, names `id` in its where clause, and is held to it
 * once more by row security.
 */
export interface Holding {
  id: string;
  db: Db;
}

/** Row security's word for "whichever holding": the worker and the look-ups that find a holding run under it. */
const EVERY = '*';

interface Pools {
  tenant?: pg.Pool;
  every?: pg.Pool;
  lead?: pg.Pool;
}
// A bundler may load this module twice in one process; the pools stay one.
const pools: Pools = ((globalThis as { middenwardPools?: Pools }).middenwardPools ??= {});

/** How long a query may last, real ms. */
const QUERY_MS = 30_000;
/** The lead's own: a leader has to know well within its lease (15 s) that the database is away. */
const LEAD_QUERY_MS = 2000;

function makePool(holding: string, more: pg.PoolConfig = {}): pg.Pool {
  const pool = new pg.Pool({
    connectionString: env().DATABASE_URL,
    max: 10,
    connectionTimeoutMillis: 2000,
    query_timeout: QUERY_MS,
    idleTimeoutMillis: 30_000,
    options: `-c app.holding=${holding} -c timezone=UTC`,
    ...more,
  });
  // Without a listener the loss of an idle connection would end the process.
  pool.on('error', () => undefined);
  // Nor may that of one that is in use, between two queries of a transaction.
  pool.on('connect', (client) => client.on('error', () => undefined));
  return pool;
}

/** Runs `work` in one transaction that sees the rows of one holding only. */
export async function inHolding<T>(holdingId: string, work: (holding: Holding) => Promise<T>): Promise<T> {
  pools.tenant ??= makePool('none');
  return drizzle({ client: pools.tenant, schema }).transaction(async (db) => {
    await db.execute(sql`select set_config('app.holding', ${holdingId}, true)`);
    return work({ id: holdingId, db });
  });
}

/**
 * A connection of its own that sees one holding, without the pools' limit on how long a query may last: an archive is one
 * snapshot from its first row to its last. Whoever asks for it ends it.
 */
export async function ownConnection(holdingId: string): Promise<pg.Client> {
  const client = new pg.Client({
    connectionString: env().DATABASE_URL,
    connectionTimeoutMillis: 2000,
    options: `-c app.holding=${holdingId} -c timezone=UTC`,
  });
  client.on('error', () => undefined);
  await client.connect();
  return client;
}

/** Drizzle on a connection in whose transaction other things go on too. */
export function onConnection(client: pg.PoolClient): Db {
  return drizzle({ client, schema });
}

/** Sees every holding: for the worker, for sign-in, and for finding which holding a key or token belongs to. */
export function everyHolding(): Db {
  pools.every ??= makePool(EVERY);
  return drizzle({ client: pools.every, schema });
}

/**
 * For the lead alone: it waits neither for a database that hangs nor for a connection that others hold. One connection, so
 * that a try after one that broke has a fresh one.
 */
export function leadDb(): Db {
  pools.lead ??= makePool(EVERY, { max: 1, query_timeout: LEAD_QUERY_MS });
  return drizzle({ client: pools.lead, schema });
}

/** The pool below `everyHolding`, for COPY and LISTEN, which drizzle does not speak. */
export function everyPool(): pg.Pool {
  pools.every ??= makePool(EVERY);
  return pools.every;
}

export async function closePools(): Promise<void> {
  const closing = [pools.tenant, pools.every, pools.lead].filter((pool) => pool !== undefined);
  delete pools.tenant;
  delete pools.every;
  delete pools.lead;
  await Promise.all(closing.map((pool) => pool.end()));
}
