import { existsSync } from 'node:fs';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { closePools, everyHolding, inHolding } from '@/db/client';
import { listAlarms } from '@/db/queries/alarm';
import { listHeapEntries } from '@/db/queries/heap-entry';
import { releaseLead, takeLead } from '@/db/queries/leader';
import { listNights } from '@/db/queries/night';
import { loadHouse } from '@/db/queries/plan';
import { listDecisions } from '@/db/queries/decision';
import { listProbeSets } from '@/db/queries/probe-set';
import { listSwitchings, readMemory } from '@/db/queries/running';
import { compile } from '@/lib/control/compile';
import { migrateMemory } from '@/lib/control/memory-versions';
import { readWorld } from '@/worker/yard/store';
import { fingerprint, houseId, playDemo, rowsOf, TO, type Played } from './scene';

let played: Played;

beforeAll(async () => {
  played = await playDemo(48);
}, 120_000);
afterAll(closePools);

const SLUGS = ['long-house', 'prop-house', 'beck-house'];
const holdingOf = (slug: string) => ({
  id: slug === 'beck-house' ? played.stonebeck : played.larkmoor,
  db: everyHolding(),
});
const switchingsOf = (slug: string) =>
  listSwitchings(holdingOf(slug), houseId(played, slug), { limit: 5000 });

function byChannelOf<One extends { channelId: string }>(all: readonly One[]): Map<string, One[]> {
  const groups = new Map<string, One[]>();
  for (const one of all) groups.set(one.channelId, [...(groups.get(one.channelId) ?? []), one]);
  return groups;
}

it.each(SLUGS)('every switching of %s has a ladder whose last step speaks and decided', async (slug) => {
  const switchings = await switchingsOf(slug);
  expect(switchings.length).toBeGreaterThan(4);
  for (const { claim, to, explanation } of switchings) {
    const last = explanation.ladder.at(-1);
    expect([last?.speaks, last?.claim, explanation.claim, explanation.state]).toEqual([
      true,
      claim,
      claim,
      to,
    ]);
  }
});

it.each(SLUGS)(
  'each channel of %s is switched on and off in turn, under numbers that only grow',
  async (slug) => {
    const byChannel = byChannelOf((await switchingsOf(slug)).toReversed());
    for (const switchings of byChannel.values()) {
      switchings.forEach(({ from, to }, index) => {
        expect([from, to]).toEqual(index % 2 === 0 ? ['off', 'on'] : ['on', 'off']);
      });
      const numbers = switchings.map(({ number }) => number ?? 0);
      expect(numbers).toEqual([...new Set(numbers)].sort((a, b) => a - b));
      expect(Math.floor((numbers[0] ?? 0) / 2 ** 32)).toBe(1);
    }
  },
);

it.each(SLUGS)('a decision of %s never repeats the one before it', async (slug) => {
  const channels = [...(played.houses.get(slug)?.channelIds.values() ?? [])];
  const all = await listDecisions(holdingOf(slug), channels, played.from, played.to);
  for (const decisions of byChannelOf(all).values()) {
    const told = decisions.map(({ state, claim }) => `${claim} ${state}`);
    expect(told.filter((one, index) => one === told[index - 1])).toEqual([]);
  }
});

it.each(SLUGS)('each relay of %s reports what was ordered, within a second', async (slug) => {
  const [row] = await rowsOf<{ late: number }>(
    played,
    slug,
    `select count(*)::int as late from switching s where s.house_id = $1 and not exists (
       select 1 from relay_report r where r.channel_id = s.channel_id and r.state = s."to" and r.number >= s.number
         and r.at between s.at and s.at + interval '1 second')`,
  );
  expect(row?.late).toBe(0);
});

it('every point spoke each 30 s from the beginning to the end, but for those whose plug was out', async () => {
  const counts = await rowsOf<{ key: string; count: number; last: Date }>(
    played,
    'long-house',
    `select p.key, count(*)::int, max(r.at) as last
     from reading r join point p on p.number = r.point where p.house_id = $1 group by 1`,
  );
  expect(counts).toHaveLength(14);
  for (const { key, count, last } of counts) {
    const silent = key === 'bench-1' ? 96 : 0; // 48 min
    expect([key, count]).toEqual([key, 48 * 120 + 1 - silent]);
    expect(TO - last.getTime()).toBeLessThan(60_000);
  }
});

it('a plug that was out raised the alarm of a silent point, somebody took it on, and it cleared', async () => {
  const alarms = await listAlarms(holdingOf('long-house'), { state: 'all', limit: 50 });
  const silent = alarms.filter((one) => one.kind === 'point-silent');
  expect(silent.map(({ about }) => about)).toEqual([{ point: 'bench-1' }]);
  const [alarm] = silent;
  expect(alarm?.acknowledgedBy).toBe('grower@larkmoor.example');
  expect((alarm?.clearedAt ?? 0) - (alarm?.raisedAt ?? 0)).toBeGreaterThan(40 * 60_000);
  expect(alarms.length).toBeLessThan(10);
});

it('while its probe was silent the fan went by the stand-in', async () => {
  const [row] = await rowsOf<{ count: number }>(
    played,
    'long-house',
    `select count(*)::int from switching s join channel c on c.id = s.channel_id
     where s.house_id = $1 and c.key = 'gate-heap-fan' and s.claim <> 'fail-safe'
       and s.at between '2026-11-30T20:06Z' and '2026-11-30T20:53Z'`,
  );
  const [failed] = await rowsOf<{ count: number }>(
    played,
    'long-house',
    `select count(*)::int from decision d join channel c on c.id = d.channel_id
     where d.house_id = $1 and c.key = 'gate-heap-fan' and d.claim = 'fail-safe'
       and d.at between '2026-11-30T20:00Z' and '2026-11-30T21:00Z'`,
  );
  expect(row?.count).toBeGreaterThan(0);
  expect(failed?.count).toBe(0);
});

it('the nights that are kept are those that their decisions and readings give', async () => {
  const nights = await listNights(holdingOf('long-house'), houseId(played, 'long-house'), { limit: 50 }, TO);
  const gate = nights.filter((one) => one.source === 'gate-heap');
  expect(gate.map((one) => one.night)).toEqual(['2026-12-01', '2026-11-30', '2026-11-29']);
  const switchings = await switchingsOf('long-house');
  const fan = played.houses.get('long-house')?.channelIds.get('gate-heap-fan');
  const starts = switchings.filter((one) => one.channelId === fan && one.to === 'on').length;
  expect(gate.reduce((sum, one) => sum + one.starts, 0)).toBe(starts);
});

it('the memory goes on where the history ends', async () => {
  for (const slug of SLUGS) {
    const record = await loadHouse(holdingOf(slug), houseId(played, slug));
    const kept = await readMemory(holdingOf(slug), houseId(played, slug));
    if (record === null) throw new Error(`${slug} is not there`);
    const memory = migrateMemory(kept?.memory);
    expect([memory.at, kept?.planRevision, memory.shape]).toEqual([
      TO,
      record.planRevision,
      compile(record.config).shape,
    ]);
    expect(kept?.state?.points.every((point) => point.quality === 'good')).toBe(true);
  }
});

it('the yard goes on from the world of the history’s end', () => {
  expect(existsSync(played.stateFile)).toBe(true);
  const saved = readWorld(played.stateFile, 20_261_201);
  expect('world' in saved ? saved.world.ms : saved.why).toBe(TO);
});

it('the next leader numbers above everything in the history, and while it leads none is played', async () => {
  const instance = '0194fdc2-0000-7000-8000-000000000001';
  const lead = await takeLead(everyHolding(), instance);
  expect(lead?.epoch).toBe(2);
  await expect(playDemo(1)).rejects.toThrow('a worker leads on this database');
  await releaseLead(everyHolding(), instance, 2);
});

it('nothing of the second holding can be seen from the first', async () => {
  const beck = houseId(played, 'beck-house');
  const seen = await inHolding(played.larkmoor, async (holding) => [
    await listSwitchings(holding, beck, { limit: 10 }),
    (await listHeapEntries(holding, beck, { limit: 10 })).items,
    await listNights(holding, beck, { limit: 10 }, TO),
    await readMemory(holding, beck),
  ]);
  expect(seen).toEqual([[], [], [], null]);
});

it('a history played again is the same history', async () => {
  const first = await playDemo(14);
  const again = await playDemo(14);
  expect(await fingerprint(again)).toEqual(await fingerprint(first));
}, 120_000);

it('the round of the last morning reads what the yard’s core and air were then', async () => {
  const rounds = await listProbeSets(holdingOf('long-house'), houseId(played, 'long-house'), { limit: 10 });
  expect(rounds.items.map((round) => [round.source, round.places.length])).toEqual([['gate-heap', 12]]);
  const celsius = (rounds.items[0]?.places ?? []).map((place) => place.celsius);
  const [core] = await rowsOf<{ value: number }>(
    played,
    'long-house',
    `select r.value from reading r join point p on p.number = r.point where p.house_id = $1 and p.key = 'gate-core'
       order by abs(extract(epoch from r.at - '${rounds.items[0]?.at ?? ''}'::timestamptz)) limit 1`,
  );
  // its hottest place is the core's own, within what a hand-held probe shows
  expect(Math.abs(Math.max(...celsius) - (core?.value ?? 0))).toBeLessThan(1);
});
