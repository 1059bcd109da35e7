// Archives that are not what they should be: each is refused in words that name the file, the line and the remedy.
import { existsSync, readdirSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { everyPool, type Holding } from '@/db/client';
import { pointNumbers } from '@/db/queries/point';
import { makeReadingMonth, storeReadings } from '@/db/queries/reading-write';
import { MANIFEST } from '@/lib/schema/archive';
import { archiveFile, archiveFolder } from '@/lib/server/archive-file';
import { broughtIn, fetched, lookedThrough, sent, workAt } from '../support/archive-way';
import {
  edited,
  manifestOf,
  rowsOf,
  unzipped,
  withManifest,
  zipped,
  type Files,
} from '../support/archive-zip';
import { newHolding, personOf, type Asker } from './asker';
import { furnish } from './furnished';

const NOW = Date.parse('2026-12-01T18:00:00Z');
let holding: Holding;
let owner: Asker;
let files: Files;
beforeAll(async () => {
  holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  const { ids } = await furnish(holding, owner);
  const point = (await pointNumbers(holding, ids['house'] ?? '')).get('bench-1')?.number ?? 0;
  await makeReadingMonth(everyPool(), NOW);
  await storeReadings(
    everyPool(),
    Array.from({ length: 50 }, (_, i) => ({ point, at: NOW - i * 30_000, value: 4 + i / 100, quality: 0 })),
  );
  files = await unzipped(await fetched(owner));
});

const READINGS = 'readings/2026-12.csv';
const holdings = async () =>
  (await everyPool().query<{ count: number }>('select count(*)::int as count from organization')).rows[0]
    ?.count;
const problemOf = async (given: Files | Buffer) => {
  const told = await lookedThrough(owner, given instanceof Map ? await zipped(given) : given, NOW);
  return [told['state'], String(told['problem'])];
};
const table = (name: string, change: (text: string) => string) =>
  withManifest(edited(files, `tables/${name}.jsonl`, change));
const firstLine = (change: (row: Record<string, unknown>) => void) => (text: string) => {
  const [line = '', ...rest] = text.split('\n');
  const row = JSON.parse(line) as Record<string, unknown>;
  change(row);
  return [JSON.stringify(row), ...rest].join('\n');
};

it('as it came it is taken, and what is inside is told before anything is put in', async () => {
  const before = await holdings();
  const told = await lookedThrough(owner, await zipped(files), NOW);
  expect(told).toMatchObject({
    state: 'checked',
    found: {
      ...{ holding: 'larkmoor', houses: ['Long house'], readings: 50, photographs: 2 },
      ...{
        months: { from: '2026-12', to: '2026-12' },
        people: [{ email: 'owner@larkmoor.example', role: 'owner' }],
      },
    },
  });
  expect(await holdings()).toBe(before);
});

describe('a row that is wrong is told by its file and line:', () => {
  it.each([
    ['not JSON', 'house', (text: string) => `{${text}`, 'tables/house.jsonl, line 1: This line is not JSON.'],
    [
      'a column that is none',
      'house',
      firstLine((row) => (row['holding_id'] = 'x')),
      'line 1: "holding_id" is no column of house.',
    ],
    [
      'a column left out',
      'point',
      firstLine((row) => delete row['role']),
      'tables/point.jsonl, line 1: role is missing.',
    ],
    [
      'a wrong kind',
      'channel',
      firstLine((row) => (row['relay'] = '1')),
      'line 1: relay must be a whole number.',
    ],
    [
      'a zone that is none',
      'house',
      firstLine((row) => (row['zone'] = 'Nowhere/X')),
      'line 1: zone is not valid',
    ],
    [
      'a slug that is a page',
      'house',
      firstLine((row) => (row['slug'] = 'people')),
      'line 1: slug is not valid: This slug is the name of a page.',
    ],
    [
      'a rule that control could not read',
      'rule_version',
      firstLine((row) => (row['body'] = { purpose: 'melt' })),
      'tables/rule_version.jsonl, line 1: body is not valid',
    ],
    [
      'a row of another table that is not there',
      'point',
      firstLine((row) => (row['house_id'] = '018f3f3f-0000-7000-8000-000000000000')),
      'line 1: house_id names 018f3f3f-0000-7000-8000-000000000000, which is no row of tables/house.jsonl.',
    ],
    [
      'the same id twice',
      'house',
      (text: string) => text + text,
      'line 2: Rows must be in the order of their id',
    ],
    [
      'a NUL',
      'house',
      (text: string) => text.replace('Long house', 'Long\\u0000house'),
      'line 1: A text holds the character NUL.',
    ],
    [
      'a last line without its end',
      'house',
      (text: string) => text.trimEnd(),
      'line 1: This line has no end.',
    ],
  ])('%s', async (_, name, change, words) => {
    const [state, problem] = await problemOf(table(name, change));
    expect([state, problem]).toEqual(['failed', expect.stringContaining(words)]);
    expect(problem).toContain('Make the archive anew');
  });

  it.each([
    [
      'a head that is another',
      (text: string) => text.replace('point,', 'probe,'),
      'line 1: The head must be',
    ],
    [
      'a point that is none',
      (text: string) => text.replace(/\n\d+,/, '\n999999,'),
      'line 2: point "999999" is no',
    ],
    [
      'another month',
      (text: string) => text.replace(/2026-12/, '2026-11'),
      'line 2: at must be a time in UTC within',
    ],
    [
      'a time that is still to come',
      (text: string) => text.replace('2026-12-01T18:00:00', '2026-12-01T18:02:01'),
      'at lies ahead of the clock of this installation.',
    ],
    [
      'no number',
      (text: string) => text.replace(/,4\.\d+,good/, ',warm,good'),
      'line 2: value "warm" is no number.',
    ],
    ['infinity', (text: string) => text.replace(/,4\.\d+,good/, ',1e999,good'), 'is no number.'],
    ['a quality that is none', (text: string) => text.replace('good', 'fair'), 'A reading has four cells'],
    [
      'a reading told twice',
      (text: string) => text.replace(/\n(.*)\n/, '\n$1\n$1\n'),
      'line 3: Readings must be in the order of point and time, each once.',
    ],
  ])('readings with %s', async (_, change, words) => {
    const [state, problem] = await problemOf(withManifest(edited(files, READINGS, change)));
    expect([state, problem]).toEqual(['failed', expect.stringContaining(words)]);
    expect(problem).toContain(READINGS);
  });
});

describe('a file that is not the one the manifest tells of', () => {
  it('is told to be damaged, where every row of it still reads', async () => {
    const [state, problem] = await problemOf(
      edited(files, READINGS, (text) => text.replace(',4.1,', ',4.9,')),
    );
    expect([state, problem]).toEqual(['failed', expect.stringContaining('SHA-256 differs')]);
    expect(problem).toMatch(/^readings\/2026-12\.csv: .*Copy the archive again/);
  });

  it('and where a line is broken by it both are said', async () => {
    const broken = edited(files, 'tables/house.jsonl', (text) => text.replace('"zone"', '"zonk"'));
    expect((await problemOf(broken))[1]).toMatch(/house\.jsonl, line 1: .*SHA-256 differs/);
  });

  it('a zip cut off in the middle is refused, and so is what is no zip', async () => {
    const bytes = await zipped(files);
    for (const given of [bytes.subarray(0, bytes.length - 4000), Buffer.from('PK not a zip at all')])
      expect((await problemOf(given))[1]).toMatch(/cannot be read as a zip/);
  });
});

describe('a zip that is no archive, or one for somebody else:', () => {
  const withFile = (name: string, text = 'x') => withManifest(new Map(files).set(name, Buffer.from(text)));
  it.each([
    ['no manifest', () => new Map([...files].filter(([name]) => name !== MANIFEST)), /no manifest\.json/],
    ['a later version', () => withManifest(files, { version: 2 }), /version 2; .*up to date, then send/],
    [
      'a newer schema',
      () => withManifest(files, { schema: 9000 }),
      /newer installation \(schema 9000.*up to date/,
    ],
    ['another format', () => withManifest(files, { format: 'zoo' }), /not that of an archive/],
    [
      'a file that nobody knows',
      () => withFile('tables/session.jsonl'),
      /"tables\/session\.jsonl" is no file/,
    ],
    [
      'a file outside the manifest',
      () => new Map(files).set('readings/2026-11.csv', Buffer.from('x')),
      /not in manifest/,
    ],
    [
      'a photograph that is none',
      () => withPicture(Buffer.from('<svg onload="x"/>')),
      /photographs\/.*no JPEG/,
    ],
    ['a photograph too few', () => withoutPicture(), /missing, though tables\/attachment\.jsonl/],
  ])('%s', async (_, given, words) => {
    const [state, problem] = await problemOf(given());
    expect([state, problem]).toEqual(['failed', expect.stringMatching(words)]);
  });
  const pictureName = () => [...files.keys()].find((name) => name.startsWith('photographs/')) ?? '';
  const withPicture = (bytes: Buffer) => withManifest(new Map(files).set(pictureName(), bytes));
  const withoutPicture = () => withManifest(new Map([...files].filter(([name]) => name !== pictureName())));

  it('names that climb out of the zip are refused, and nothing is written anywhere', async () => {
    // the library that packs refuses such names too, so it is put in behind its back
    const long = 'readings/2026-11.csv';
    const bytes = await zipped(new Map(files).set(long, Buffer.from('x')));
    const climbing = Buffer.from(bytes.toString('latin1').replaceAll(long, '../../../tmp/x11.csv'), 'latin1');
    expect((await problemOf(climbing))[1]).toMatch(/invalid relative path/);
    expect(readdirSync(archiveFolder())).toEqual([]);
  });

  it('a bomb is told by its directory, and nothing of it is unpacked', async () => {
    const big = new Map(files).set('people.jsonl', Buffer.alloc(64 * 1024 ** 2, 'a'));
    expect((await problemOf(withManifest(big)))[1]).toMatch(/people\.jsonl would unpack to 67108864 bytes/);
  });

  it('a directory that tells too little of a file is found out while the file is read', async () => {
    const lines = 'x'.repeat(900_000);
    const bytes = await zipped(withManifest(new Map(files).set('people.jsonl', Buffer.from(lines))));
    // the length in the directory and in the head, little end first
    const lying = Buffer.from(bytes.toString('latin1').replaceAll(hex(900_000), hex(9000)), 'latin1');
    expect((await problemOf(lying))[0]).toBe('failed');
  });
  const hex = (value: number) => {
    const four = Buffer.alloc(4);
    four.writeUInt32LE(value);
    return four.toString('latin1');
  };
});

describe('what was begun and is not wanted', () => {
  it('leaves nothing: dropped while it is brought in, or where the worker ends', async () => {
    const before = await holdings();
    const path = await sent(owner, await zipped(files));
    await workAt(NOW);
    await owner.ask('POST', `${path}/bring`, { name: 'Never' });
    let turns = 1;
    await workAt(NOW, () => (turns -= 1) >= 0);
    expect((await owner.get(path)).body['state']).toBe('to-bring');
    expect(await holdings()).toBe(before);
    expect((await owner.ask('DELETE', path)).status).toBe(204);
    await workAt(NOW);
    expect(await holdings()).toBe(before);
    expect(existsSync(archiveFile(path.split('/')[2] ?? ''))).toBe(false);
  });

  it('a row that only the database refuses ends it with words, and nothing stays', async () => {
    const before = await holdings();
    const twice = (text: string) => {
      const row = JSON.parse(text.split('\n')[0] ?? '') as Record<string, unknown>;
      return `${text}${JSON.stringify({ ...row, id: 'ffffffff-0000-7000-8000-000000000000' })}\n`;
    };
    const told = await broughtIn(
      owner,
      await zipped(table('point', (text) => pointTwice(text, twice))),
      'Twice',
      NOW,
    );
    expect(told).toMatchObject({ state: 'failed', into: null });
    expect(told['problem']).toMatch(
      /tables\/point\.jsonl, line \d+: The database refuses a row: duplicate key .*point_key.*Make the archive anew/,
    );
    expect(await holdings()).toBe(before);
  });
  /** The same key under another id and number. */
  const pointTwice = (text: string, twice: (text: string) => string) => {
    const lines = twice(text).trimEnd().split('\n');
    const last = JSON.parse(lines.pop() ?? '') as Record<string, unknown>;
    return `${[...lines, JSON.stringify({ ...last, number: 900_000_000 })].join('\n')}\n`;
  };

  it('an archive of an earlier schema comes in, and columns that came since take their default', async () => {
    const older = table('heap_entry', (text) =>
      text.replace(/"smell":[^,]+,/g, '').replace(/,"revision":1/g, ''),
    );
    const told = await broughtIn(
      owner,
      await zipped(withManifest(older, { schema: manifestOf(files).schema - 1 })),
      'Old',
      NOW,
    );
    expect(told).toMatchObject({ state: 'done', into: { name: 'Old' } });
    expect(rowsOf(older, 'heap_entry')[0]).not.toHaveProperty('revision');
  });
});
