// Reports from the nights that Duty shows, and their letters: once, whoever sends them.
import { afterAll, beforeAll, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { v7 as uuid } from 'uuid';
import { closePools, everyHolding, everyPool, inHolding, type Holding } from '@/db/client';
import { acknowledgeAlarm, clearAlarm, listAlarms, raiseAlarm } from '@/db/queries/alarm';
import { createHeapCost, writeMoneyBook } from '@/db/queries/money';
import { readMoney } from '@/db/queries/money-page';
import { listNights } from '@/db/queries/night';
import { refreshNights } from '@/db/queries/night-making';
import { listMembers, removeMember } from '@/db/queries/member';
import { storeReadings, type ReadingRow } from '@/db/queries/reading-write';
import { readReport } from '@/db/queries/report-page';
import { createReportSchedule, findReportSchedule } from '@/db/queries/report-schedule';
import { findHouse } from '@/db/queries/house';
import { writeRunning } from '@/db/queries/running';
import { point } from '@/db/schema/node';
import { longHouse } from '@/db/seed/long-house';
import { writeHolding } from '@/db/seed/people';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { nightNamed } from '@/lib/analysis/night';
import { totalOf } from '@/lib/analysis/totals';
import { SECTIONS } from '@/lib/schema/report';
import type { House } from '@/lib/schema/yard-view';
import type { Letter } from '@/lib/server/mail';
import { energy } from '@/lib/units/format';
import { USUAL } from '@/lib/units/preferences';
import { sendReports } from '@/worker/jobs/reports';

const hour = 3_600_000;
const ZONE = 'Europe/London';
/** A Thursday and the Friday after it: the week ends with the night of Sunday the 29th. */
const nights = ['2026-11-26', '2026-11-27'].map((name) => nightNamed(name, ZONE));
const begin = nights[0]?.from ?? 0;
const weekEnds = nightNamed('2026-11-29', ZONE).to;
const settled = weekEnds + hour;
const owner = 'owner@larkmoor.example';
const grower = 'grower@larkmoor.example';
let holding: Holding;
let seeded: SeededHouse;
let house: House;

beforeAll(async () => {
  const people = [
    { email: owner, name: 'Owner', role: 'owner' },
    { email: grower, name: 'Grower', role: 'grower' },
  ];
  holding = await writeHolding('Larkmoor Growers', 'larkmoor', people, 'fifteen letters!', new Date(begin));
  seeded = await writeHouse(holding, longHouse, owner, new Date(begin));
  const points = await holding.db.select().from(point).where(eq(point.houseId, seeded.houseId));
  const level: Record<string, number> = {
    ...{ 'bench-1': 4.5, 'house-air': 5.5, outdoors: -4, 'gate-core': 52 },
    ...{ 'loop-intake': 5, 'loop-return': 15 },
  };
  const rows: ReadingRow[] = [];
  for (let at = begin; at < begin + 48 * hour; at += 60_000)
    for (const { key, number } of points)
      if (level[key] !== undefined) rows.push({ point: number, at, value: level[key], quality: 0 });
  await storeReadings(everyPool(), rows);
  const of = {
    ...{ holdingId: holding.id, houseId: seeded.houseId },
    channelId: seeded.channelIds.get('gate-heap-fan') ?? '',
  };
  // from 21:00 to 23:00 of each night: an hour at each price below
  const decisions = nights.flatMap(({ from }) => [
    { ...of, id: uuid(), at: new Date(from + 9 * hour), state: 'on' as const, claim: 'band' as const },
    { ...of, id: uuid(), at: new Date(from + 11 * hour), state: 'off' as const, claim: 'idle' as const },
  ]);
  await writeRunning(everyHolding(), { switchings: [], decisions, reports: [], memories: [] });
  const found = await findHouse(holding, seeded.houseId);
  if (found === null) throw new Error('the house was written a moment ago');
  house = found;
  const band = { from: '22:00', to: '06:00', days: 'all' as const, price: '0.2' };
  await writeMoneyBook(
    holding,
    {
      revision: 0,
      currency: 'EUR',
      tariffs: [{ from: '2026-01-01', price: '0.3', bands: [band] }],
      fuels: [],
    },
    { by: owner, now: new Date(begin) },
  );
  const cost = { source: 'gate-heap', kind: 'materials' as const, on: '2026-10-01', text: '', years: 1 };
  await createHeapCost(
    holding,
    house,
    { ...cost, amount: '12.5', work: null },
    { by: owner, now: new Date(begin) },
  );
  await raiseAlarm(holding, {
    ...{
      houseId: seeded.houseId,
      key: 'frost',
      kind: 'frost',
      about: { point: 'bench-1' },
      data: { value: 0.5 },
    },
    at: begin + 14 * hour,
  });
  const [alarm] = await listAlarms(holding, { state: 'active', houseId: seeded.houseId, limit: 1 });
  await acknowledgeAlarm(holding, alarm?.id ?? '', grower, begin + 14.5 * hour, 'Lit the heater.');
  await clearAlarm(holding, 'frost', begin + 15 * hour);
  await refreshNights(holding, seeded.houseId, settled);
}, 120_000);
afterAll(closePools);

const ask = { span: 'week' as const, night: '2026-11-26', sections: SECTIONS };
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

it('the fan is paid at the price of each of its hours, and the season has its price all in', async () => {
  const { balance } = await readMoney(holding, house, 'gate-heap', settled);
  expect(balance?.fan.uses.map((use) => [use.price, use.seconds])).toEqual([
    [300_000, 7200],
    [200_000, 7200],
  ]);
  // 12 W for two hours is 24 Wh a night: two nights of 12 Wh at 0.30 and 12 Wh at 0.20
  expect(balance?.fan.micros).toBeCloseTo(2 * (0.012 * 300_000 + 0.012 * 200_000), 6);
  const heat = balance?.totals.heat;
  const allIn = balance?.allIn;
  if (allIn === undefined || typeof allIn === 'string') throw new Error(`no price: ${String(allIn)}`);
  expect(allIn.perKWh).toBeCloseTo((12_500_000 + 12_000) / (heat?.kWh ?? 0), 3);
});

it('a report says to the last digit what the nights of Duty say', async () => {
  const report = await readReport(holding, house, ask, USUAL, settled);
  const kept = await listNights(holding, house.id, { sources: ['gate-heap'], limit: 500 }, settled);
  const told = kept.filter(({ night }) => night >= '2026-11-23' && night <= '2026-11-29');
  const totals = totalOf(told);
  const figures = report.blocks.find((block) => block.key === 'figures');
  const heat = figures?.rows?.find((row) => row.name === 'Heat');
  expect(heat?.value).toBe(energy(totals.heat?.kWh ?? null, 1, totals.heat?.sd));
  const table = report.blocks.find((block) => block.key === 'nights')?.table;
  expect(table?.rows).toHaveLength(told.length);
  expect(table?.foot?.[3]).toBe(String(totals.starts));
  expect(report.title).toBe('Week of 23 to 29 November 2026');
});

it('a report for an insurer tells what rang, who answered, what they did, and what is not kept', async () => {
  const report = await readReport(holding, house, { ...ask, sections: ['alarms'] }, USUAL, settled);
  const [block] = report.blocks;
  expect(report.blocks).toHaveLength(1);
  const row = block?.table?.rows.find((cells) => cells.join(' ').includes('Lit the heater.'));
  expect(plain(row?.[2] ?? '')).toContain(grower);
  expect(block?.rows?.filter((one) => one.value === 'not kept yet')).toHaveLength(1);
  expect(block?.rows).toContainEqual({
    name: 'Bench mat, protection',
    value: 'The residual-current device: no test is written down.',
  });
});

it('another holding reads no line of it', async () => {
  const stranger = await writeHolding(
    'Stonebeck Nursery',
    'stonebeck',
    [],
    'fifteen letters!',
    new Date(begin),
  );
  const told = await inHolding(stranger.id, (other) => readMoney(other, house, 'gate-heap', settled));
  expect([told.book.currency, told.sources, told.costs]).toEqual([null, [], []]);
});

const sent: Letter[] = [];
const post = (now: number, send = (letter: Letter) => Promise.resolve(void sent.push(letter))) =>
  sendReports({ db: everyHolding(), now, url: 'http://localhost:3000', send });
const whom = () => sent.map((letter) => letter.to).sort();

it('of two workers that look at the same moment each letter is sent by one, and by none again later', async () => {
  const given = { span: 'week' as const, sections: [...SECTIONS], to: [owner, grower] };
  const made = await createReportSchedule(holding, house.id, given, { by: owner, now: new Date(begin) });
  await Promise.all([post(weekEnds - 1), post(weekEnds + 60_000)]);
  expect(sent).toEqual([]);
  await Promise.all([post(settled), post(settled), post(settled)]);
  expect(whom()).toEqual([grower, owner]);
  await post(settled + 24 * hour);
  expect(sent).toHaveLength(2);
  const [letter] = sent;
  expect(letter?.subject).toBe('Long house: Week of 23 to 29 November 2026');
  expect(letter?.text).toContain('http://localhost:3000/long-house/reports?span=week&night=2026-11-23');
  expect(letter?.html).toContain('Lit the heater.');
  const kept = await findReportSchedule(holding, house.id, made.id);
  expect(kept?.last).toMatchObject({ fromNight: '2026-11-23', toNight: '2026-11-29' });
  expect(kept?.last?.sentAt).not.toBeNull();
});

it('a letter that the server refuses goes with the next turn, once; one who left gets none', async () => {
  sent.length = 0;
  const next = settled + 7 * 24 * hour;
  const leaver = (await listMembers(holding)).find((row) => row.email === grower);
  if (leaver === undefined) throw new Error('the grower is a member');
  await removeMember(holding, leaver);
  await expect(post(next, () => Promise.reject(new Error('no server')))).rejects.toThrow('no server');
  await post(next);
  await post(next);
  expect(whom()).toEqual([owner]);
});

it('what had ended before anybody asked for it is not sent', async () => {
  sent.length = 0;
  const late = settled + 8 * 24 * hour;
  const given = { span: 'month' as const, sections: [...SECTIONS], to: [owner] };
  await createReportSchedule(holding, house.id, given, { by: owner, now: new Date(late) });
  await post(late + hour);
  expect(sent).toEqual([]);
});
