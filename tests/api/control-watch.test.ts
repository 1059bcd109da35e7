// A worker cannot tell of its own death; web does.
import { sql } from 'drizzle-orm';
import { beforeAll, expect, test } from 'vitest';
import { everyHolding } from '@/db/client';
import { listAlarms } from '@/db/queries/alarm';
import { takeLead } from '@/db/queries/leader';
import type { Holding } from '@/db/client';
import { lookAtControl } from '@/lib/server/control-watch';
import { newHolding } from './asker';

let holdings: Holding[];
beforeAll(async () => {
  holdings = [await newHolding('larkmoor'), await newHolding('stonebeck')];
});
const standing = async () => {
  const lists = await Promise.all(holdings.map((one) => listAlarms(one, { state: 'active', limit: 9 })));
  return lists.map((list) => list.map((alarm) => alarm.kind));
};
const MINUTE_MS = 60_000;
const now = Date.now();

test('in its first quarter of a minute web waits for a worker to lead', async () => {
  expect(await lookAtControl(now - 14_000, now)).toBe(true);
  expect(await standing()).toEqual([[], []]);
});

test('when no heart beats, every holding has one alarm, however often web looks', async () => {
  expect(await lookAtControl(now - MINUTE_MS, now)).toBe(false);
  expect(await lookAtControl(now - MINUTE_MS, now)).toBe(false);
  expect(await standing()).toEqual([['control-not-running'], ['control-not-running']]);
});

test('it is cleared once a heart beats again, and raised when that one stops', async () => {
  await takeLead(everyHolding(), '018f3f3f-0000-7000-8000-000000000001');
  expect(await lookAtControl(now - MINUTE_MS, Date.now())).toBe(true);
  expect(await standing()).toEqual([[], []]);
  await everyHolding().execute(sql`update leader set heartbeat = now() - interval '16 seconds'`);
  expect(await lookAtControl(now - MINUTE_MS, Date.now())).toBe(false);
  expect(await standing()).toEqual([['control-not-running'], ['control-not-running']]);
});
