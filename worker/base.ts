import type { Logger } from 'pino';
import type pg from 'pg';
import type { Db } from '@/db/client';
import type { Clock } from './clock';
import type { Metrics } from './metrics';

/** What every part of the worker is handed, so that tests can hand it another. */
export interface Base {
  clock: Clock;
  log: Logger;
  db: Db;
  pool: pg.Pool;
  metrics: Metrics;
}
