// A holding goes out, comes in beside itself, and goes out again: what was known is known.
import { afterAll, beforeAll, expect, it } from 'vitest';
import { closePools, everyHolding, everyPool, type Holding } from '@/db/client';
import { listHouses, loadHouseInService } from '@/db/queries/plan';
import { MANIFEST } from '@/lib/schema/archive';
import { broughtIn, fetched } from '../support/archive-way';
import { manifestOf, rowsOf, unzipped, type Files } from '../support/archive-zip';
import { playDemo, TO, type Played } from '../seed/scene';
import { personOf, type Asker, type Json } from './asker';
import { picture } from './picture';

let played: Played;
let owner: Asker;
let first: Files;
let second: Files;
let brought: Holding;
let one: Json;

beforeAll(async () => {
  played = await playDemo(48);
  const holding = { id: played.larkmoor, db: everyHolding() };
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  await personOf(holding, 'grower', 'grower@larkmoor.example');
  const at = '/houses/long-house';
  const entries = (await owner.get(`${at}/heap-entries`)).body['items'] as Json[];
  await owner.make(`${at}/heap-entries/${String(entries[0]?.['id'])}/photographs`, await picture());
  await owner.make('/materials', {
    ...{ name: 'Barn leaves', density: 170, moisture: 0.62, carbon: 0.46, nitrogen: 0.017 },
    from: 'Dried in the oven.',
  });
  await owner.make(`${at}/heap-costs`, { source: 'gate-heap', kind: 'pipe', on: '2026-10-03', amount: '85' });
  await owner.make(`${at}/report-schedules`, { span: 'week', to: ['owner@larkmoor.example'] });
  const bytes = await fetched(owner);
  first = await unzipped(bytes);
  one = await broughtIn(owner, bytes, 'Larkmoor again', TO);
  const into = one['into'] as { id: string };
  brought = { id: into.id, db: everyHolding() };
  await owner.ask('POST', `/archives/${String(one['id'])}/bring`, { name: 'twice' });
  second = await unzipped(await fetched(await inHoldingOf(into.id)));
}, 180_000);
afterAll(closePools);

/** The same owner, at work in the holding that came in. */
async function inHoldingOf(id: string): Promise<Asker> {
  await everyPool().query(
    `update session set active_organization_id = $1 where user_id = (select id from "user" where email = $2)`,
    [id, 'owner@larkmoor.example'],
  );
  return owner;
}

/** Ids and numbers of points by the order in which they are told of: that is what must be the same. */
function unnamed(files: Files): Map<string, string> {
  const labels = new Map<string, string>();
  const numbers = new Map(
    rowsOf(files, 'point').map((row, place) => [Number(row['number']), `point ${place}`]),
  );
  const label = (id: string) => labels.get(id) ?? labels.set(id, `id ${labels.size}`).get(id) ?? '';
  const told = new Map<string, string>();
  for (const name of [...files.keys()].filter((path) => /^(tables|readings)/.test(path)).sort()) {
    if (/person_command|audit_log|night/.test(name)) continue;
    const text = files.get(name)?.toString('utf8') ?? '';
    told.set(
      name,
      text
        .replace(/[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}/g, label)
        .replace(/^(\d+),/gm, (_all, number: string) => `${numbers.get(Number(number)) ?? 'none'},`)
        .replace(name.endsWith('/point.jsonl') ? /"number":\d+/g : /$^/, '"number":0')
        // what is not so any more once it came in
        .replace(name.endsWith('/node.jsonl') ? /"revoked_at":[^,]+/g : /$^/, '"revoked_at":"x"')
        .replace(name.endsWith('/channel.jsonl') ? /"proved_at":[^,]+/g : /$^/, '"proved_at":"x"')
        .replace(name.endsWith('/alarm.jsonl') ? /"cleared_at":[^,]+/g : /$^/, '"cleared_at":"x"')
        .replace(name.endsWith('/report_schedule.jsonl') ? /"removed_at":[^,}]+/g : /$^/, '"removed_at":"x"'),
    );
  }
  return told;
}

const nightsOf = (files: Files, table: string) =>
  rowsOf(files, table)
    .map(({ night, body }) => ({ night, body: { ...(body as Json), recipe: null } }))
    .sort((a, b) => (JSON.stringify(a) < JSON.stringify(b) ? -1 : 1));

it('every table and every reading comes out again as it went in, but for the ids', () => {
  const [before, after] = [unnamed(first), unnamed(second)];
  expect([...after.keys()]).toEqual([...before.keys()]);
  for (const [name, text] of before) expect(after.get(name), name).toBe(text);
  const { files } = manifestOf(first);
  const rows = new Map(files.map((file) => [file.path, file.rows]));
  for (const table of [
    'switching',
    'decision',
    'relay_report',
    'heap_entry',
    'probe_set',
    'attachment',
    'rule_version',
  ])
    expect(rows.get(`tables/${table}.jsonl`), table).toBeGreaterThan(0);
  expect(files.find((file) => file.path === 'readings/2026-12.csv')?.rows).toBeGreaterThan(10_000);
});

it('the nights that are made anew of it are those that there were, to the last figure', () => {
  for (const table of ['night', 'house_night']) {
    expect(nightsOf(first, table).length).toBeGreaterThan(3);
    expect(nightsOf(second, table)).toEqual(nightsOf(first, table));
  }
});

it('photographs are the same bytes', () => {
  const pictures = (files: Files) =>
    [...files].flatMap(([name, bytes]) =>
      name.startsWith('photographs/') ? [bytes.toString('base64')] : [],
    );
  expect(pictures(first)).toHaveLength(1);
  expect(pictures(second)).toEqual(pictures(first));
});

// the database sums in the order in which rows lie, so the last bit of a mean may differ
it('roll-ups are those of the holding that it came from', async () => {
  const of = async (holdingId: string) => {
    const { rows } = await everyPool().query(
      `select h.slug, p.key, r.step_s, r.at, r.least, round(r.mean::numeric, 9) as mean, r.greatest, r.count from rollup r
       join point p on p.number = r.point join house h on h.id = p.house_id
       where p.holding_id = $1 order by 1, 2, 3, 4`,
      [holdingId],
    );
    return rows as Json[];
  };
  const before = await of(played.larkmoor);
  expect(before.length).toBeGreaterThan(1000);
  expect(await of(brought.id)).toEqual(before);
});

it('no secret and nothing of the other holding is inside', async () => {
  const { rows } = await everyPool().query<{ secret: string }>(
    `select token_hash as secret from node union select password from account where password is not null
     union select token from session`,
  );
  // the manifest says in words what is left out
  const told = [...first].filter(([name]) => name !== MANIFEST);
  const text = told.map(([, bytes]) => bytes.toString('latin1')).join('\n');
  expect(rows.length).toBeGreaterThan(4);
  for (const { secret } of rows) expect(text.includes(secret)).toBe(false);
  for (const word of ['token_hash', '"password', 'beck-house', 'Beck heap'])
    expect(text.includes(word), word).toBe(false);
  expect(first.get('people.jsonl')?.toString('utf8')).toContain('grower@larkmoor.example');
});

it('nothing that came in is driven: no house is taken up, no token opens, nothing counts as proved', async () => {
  expect((await listHouses(everyHolding())).filter((head) => head.holdingId === brought.id)).toEqual([]);
  const { rows: houses } = await everyPool().query<{ id: string; laid: boolean }>(
    'select id, laid_up_at is not null as laid from house where holding_id = $1',
    [brought.id],
  );
  expect(houses.map((row) => row.laid)).toEqual([true, true]);
  for (const { id } of houses) expect(await loadHouseInService(brought, id)).toBeNull();
  const { rows } = await everyPool().query<{
    open: number;
    proved: number;
    waiting: number;
    letters: number;
  }>(
    `select (select count(*)::int from node where holding_id = $1 and (revoked_at is null or token_hash ~ '^[0-9a-f]{64}$')) as open,
       (select count(*)::int from channel where holding_id = $1 and proved_at is not null) as proved,
       (select count(*)::int from person_command where holding_id = $1) as waiting,
       (select count(*)::int from report_schedule where holding_id = $1 and removed_at is null) as letters`,
    [brought.id],
  );
  expect(rows).toEqual([{ open: 0, proved: 0, waiting: 0, letters: 0 }]);
});

it('it belongs to whoever brought it in, and to nobody else', async () => {
  const { rows } = await everyPool().query<{ email: string; role: string }>(
    `select u.email, m.role from member m join "user" u on u.id = m.user_id where m.organization_id = $1`,
    [brought.id],
  );
  expect(rows).toEqual([{ email: 'owner@larkmoor.example', role: 'owner' }]);
  expect(one).toMatchObject({ state: 'done', into: { name: 'Larkmoor again' } });
});

it('nobody orders anything by hand in a house that is laid up', async () => {
  for (const path of ['all-off', 'channels/1/hand']) {
    const body = path === 'all-off' ? {} : { state: 'on' };
    const told = await owner.ask('POST', `/houses/long-house/${path}`, body);
    expect([path, told.status, told.text]).toEqual([path, 409, expect.stringContaining('laid up')]);
  }
});

it('a house is put in service by its owner’s word, and unproved wiring must be accepted outright', async () => {
  const path = '/houses/long-house/in-service';
  const refused = await owner.ask('POST', path, {});
  expect([refused.status, refused.text]).toEqual([409, expect.stringContaining('Gate-heap fan')]);
  const told = await owner.ask('POST', path, { acceptUnproved: true });
  expect([told.status, told.body['laidUpAt']]).toEqual([200, null]);
  const heads = (await listHouses(everyHolding())).filter((head) => head.holdingId === brought.id);
  expect(heads.map((head) => head.slug)).toEqual(['long-house']);
  expect((await owner.ask('POST', path, { acceptUnproved: true })).status).toBe(409);
});
