// A point's calibrations, its probe in a bath, two probes that were swapped, and its photographs.
import sharp from 'sharp';
import { beforeAll, expect, test } from 'vitest';
import { everyPool, type Holding } from '@/db/client';
import { pointNumbers } from '@/db/queries/point';
import { storeReadings } from '@/db/queries/reading-write';
import { type Asker, errorsOf, itemsOf, type Json, newHolding, personOf } from './asker';
import { picture } from './picture';
import * as shown from './shown';

const AT = '/houses/long-house';
const BENCH = `${AT}/points/bench-1`;
let larkmoor: Holding;
let installer: Asker;
let grower: Asker;
let stranger: Asker;
let houseId: string;

beforeAll(async () => {
  larkmoor = await newHolding('larkmoor');
  installer = await personOf(larkmoor, 'installer', 'installer@larkmoor.example');
  grower = await personOf(larkmoor, 'grower', 'grower@larkmoor.example');
  stranger = await personOf(await newHolding('stonebeck'), 'owner', 'owner@stonebeck.example');
  houseId = String((await installer.make('/houses', shown.house))['id']);
  await installer.make(`${AT}/nodes`, shown.node);
  for (const point of shown.otherPoints) await installer.make(`${AT}/points`, point);
  await installer.make(`${AT}/points`, shown.bench);
  await installer.make(`${AT}/points`, shown.lift);
  await installer.make(`${AT}/sources`, shown.source);
  await installer.make(`${AT}/channels`, shown.fan);
  await installer.make(`${AT}/loops`, shown.loop);
});

/** Readings of a point every 30 s up to now, newest last. */
async function read(key: string, values: readonly number[]): Promise<void> {
  const number = (await pointNumbers(larkmoor, houseId)).get(key)?.number ?? 0;
  const now = Date.now();
  const rows = values.map((value, place) => ({
    ...{ point: number, value, quality: 0 as const },
    at: now - (values.length - 1 - place) * 30_000,
  }));
  await storeReadings(everyPool(), rows);
}
const ice = { at: 'ice', raw: 0.4, rawSd: 0.03, readings: 10 };
const bath = (reference: number, raw: number) => ({
  ...{ at: 'thermometer', reference, referenceSd: 0.1, raw, rawSd: 0.02, readings: 10 },
});
const calibrate = (body: unknown, asker = installer) => asker.ask('POST', `${BENCH}/calibrations`, body);

test('a probe in a bath is told raw, and is steady once it lies still', async () => {
  expect((await installer.get(`${BENCH}/raw`)).body).toMatchObject({ at: null, raw: null, why: 'silent' });
  await read('bench-1', [0.4, 0.44, 0.38, 0.4, 0.4, 0.38]);
  const told = (await grower.get(`${BENCH}/raw`)).body;
  expect(told).toMatchObject({ raw: 0.38, isSteady: true, why: null, readings: 6 });
  expect(told['mean']).toBeCloseTo(0.4, 6);
});

test('an ice bath gives an offset from now on; what was read before stays as it was', async () => {
  const told = await calibrate({ places: [ice], note: 'flask of the packing shed' });
  expect(told).toMatchObject({
    status: 201,
    body: { kind: 'one-place', offset: -0.4, gain: 1, by: 'installer@larkmoor.example' },
  });
  expect(told.body['places']).toEqual([{ ...ice, reference: 0, referenceSd: 0.1 }]);
  // √(0.1² + (0.03 ÷ √10)²)
  expect(told.body['residual']).toBeCloseTo(0.100449, 6);
  expect((await installer.get(BENCH)).body).toMatchObject({ offset: -0.4, gain: 1, revision: 2 });
  const series = (await grower.get(`${AT}/readings?points=bench-1`)).body['points'] as Record<string, Json>;
  expect(series['bench-1']?.['value']).toEqual([0.4, 0.44, 0.38, 0.4, 0.4, 0.38]);
  // the probe still lies at the same raw value
  expect((await installer.get(`${BENCH}/raw`)).body).toMatchObject({ raw: 0.38 });
});

test('two places give offset and gain; the list keeps every one, newest first', async () => {
  const told = await calibrate({ places: [bath(0, -0.2), bath(40.2, 39.8)] });
  expect(told).toMatchObject({ status: 201, body: { kind: 'two-places' } });
  expect(told.body['gain']).toBeCloseTo(1.005, 9);
  expect(told.body['offset']).toBeCloseTo(0.201, 9);
  const kinds = itemsOf(await grower.get(`${BENCH}/calibrations`)).map((one) => one['kind']);
  expect(kinds).toEqual(['two-places', 'one-place', 'typed']);
  // one place afterwards keeps the gain that two have found
  expect((await calibrate({ places: [ice] })).body['gain']).toBeCloseTo(1.005, 9);
});

test('boiling water is reckoned from the altitude of the house', async () => {
  const told = await calibrate({
    places: [
      { ...ice, raw: 0 },
      { at: 'boiling', raw: 99, rawSd: 0, readings: 9 },
    ],
  });
  const [, boiling] = told.body['places'] as Json[];
  expect(boiling?.['reference']).toBeCloseTo(98.95, 1);
});

test('an unusual correction is asked about, and kept when it is meant so', async () => {
  const far = { places: [{ ...ice, raw: 4.2 }] };
  const asked = await calibrate(far);
  expect(asked.status).toBe(409);
  expect(asked.text).toContain('more than a sound probe is wrong by');
  expect(await calibrate({ ...far, acceptUnusual: true })).toMatchObject({ status: 201 });
});

test.each([
  ['no place', { places: [] }, 'places'],
  ['three', { places: [ice, ice, ice] }, 'places'],
  ['two at one spot', { places: [ice, { ...ice, raw: 0.5 }] }, 'places'],
  ['a thermometer that shows nothing', { places: [{ ...ice, at: 'thermometer' }] }, 'places.0.reference'],
  ['ice of another temperature', { places: [{ ...ice, reference: -5 }] }, 'places.0.reference'],
  ['a raw value that is text', { places: [{ ...ice, raw: '0.4' }] }, 'places.0.raw'],
  ['one beyond all sense', { places: [{ ...ice, raw: 1e308 }] }, 'places.0.raw'],
  ['half a reading', { places: [{ ...ice, readings: 3.5 }] }, 'places.0.readings'],
  ['a note without end', { places: [ice], note: 'x'.repeat(501) }, 'note'],
  ['a key that is not known', { places: [ice], gain: 2 }, 'gain'],
])('%s is refused at its field', async (_, body, path) => {
  const told = await calibrate(body);
  expect(told.status).toBe(422);
  expect((errorsOf(told) as Json[]).map((one) => one['path'])).toContain(path);
});

test('a derived point and one of another unit are not put into ice', async () => {
  for (const key of ['lift', 'fan-amps'])
    expect((await installer.ask('POST', `${AT}/points/${key}/calibrations`, { places: [ice] })).status).toBe(
      422,
    );
});

test('a grower may look and not calibrate', async () => {
  expect((await calibrate({ places: [ice] }, grower)).status).toBe(403);
});

const point = async (key: string) => (await installer.get(`${AT}/points/${key}`)).body;

test('swapped probes change places: what names them goes on meaning the same place', async () => {
  const rule = await grower.make(`${AT}/rules`, shown.rule);
  const before = { bench: await point('bench-1'), air: await point('house-air') };
  const told = await installer.ask('POST', `${BENCH}/exchange`, { with: 'house-air' });
  expect(told).toMatchObject({ status: 200, body: { key: 'bench-1', name: 'house-air', role: 'house-air' } });
  const air = await point('house-air');
  expect(air).toMatchObject({ name: 'Bench probe 1', role: 'bench', maxRate: 0.5, id: before.air['id'] });
  // what is the probe's stays with its key: calibration and range
  const bench = await point('bench-1');
  expect(bench).toMatchObject({ offset: before.bench['offset'], gain: before.bench['gain'], max: 85 });
  const body = (await grower.get(`/rules/${String(rule['slug'])}`)).body['body'] as Json;
  expect(body).toMatchObject({ point: 'house-air', standIns: [{ point: 'bench-1', offset: -0.5 }] });
  expect((await installer.get(`${AT}/channels/1`)).body['fallback']).toMatchObject({ point: 'house-air' });
  expect((await point('lift'))['derived']).toMatchObject({ points: ['bench-1', 'outdoors'] });
  expect((await installer.ask('POST', `${BENCH}/exchange`, { with: 'house-air' })).status).toBe(200);
  expect(await point('bench-1')).toMatchObject({ name: 'Bench probe 1', role: 'bench' });
});

test('loops and sources follow their places too', async () => {
  expect(
    (await installer.ask('POST', `${AT}/points/loop-intake/exchange`, { with: 'loop-return' })).status,
  ).toBe(200);
  expect(itemsOf(await installer.get(`${AT}/loops`))).toMatchObject([
    { intake: 'loop-return', return: 'loop-intake' },
  ]);
  await installer.ask('POST', `${AT}/points/gate-core/exchange`, { with: 'gate-base' });
  expect(itemsOf(await installer.get(`${AT}/sources`))).toMatchObject([
    { corePoint: 'gate-base', basePoint: 'gate-core' },
  ]);
});

test.each([
  ['itself', 'bench-1'],
  ['a derived one', 'lift'],
  ['one of another unit', 'fan-amps'],
  ['one that is not there', 'nowhere'],
  ['no key', '../../x'],
])('a point is not exchanged with %s', async (_, other) => {
  const told = await installer.ask('POST', `${BENCH}/exchange`, { with: other });
  expect(told.status).toBe(422);
  expect((errorsOf(told) as Json[])[0]?.['path']).toBe('with');
});

test('a photograph of the place is kept without what the phone wrote into it, and taken away by who may', async () => {
  const photos = `${BENCH}/photographs`;
  const made = await installer.make(`${photos}?shows=shield`, await picture());
  expect(made).toMatchObject({ shows: 'shield', by: 'installer@larkmoor.example' });
  const shownPicture = await grower.get(`${AT}/photographs/${String(made['id'])}`);
  expect(shownPicture.status).toBe(200);
  const { exif, format } = await sharp(shownPicture.bytes).metadata();
  expect([exif, format]).toEqual([undefined, 'jpeg']);
  expect((await stranger.get(`${AT}/photographs/${String(made['id'])}`)).status).toBe(404);
  // the heap book's way of taking a picture out is not a grower's way round to the wiring
  expect((await grower.ask('DELETE', `${AT}/photographs/${String(made['id'])}`)).status).toBe(404);
  expect((await grower.ask('DELETE', `${photos}/${String(made['id'])}`)).status).toBe(403);
  expect(
    (await installer.ask('DELETE', `${AT}/points/outdoors/photographs/${String(made['id'])}`)).status,
  ).toBe(404);
  expect((await installer.ask('DELETE', `${photos}/${String(made['id'])}`)).status).toBe(204);
  expect(itemsOf(await grower.get(photos))).toEqual([]);
});

test('what is no picture is refused, and so is a seventh', async () => {
  const photos = `${BENCH}/photographs`;
  expect((await installer.ask('POST', photos, new TextEncoder().encode('<svg onload=x>'))).status).toBe(422);
  expect((await installer.ask('POST', `${photos}?shows=garden`, await picture())).status).toBe(422);
  const small = await picture('png', 40);
  for (let count = 0; count < 6; count += 1) await installer.make(photos, small);
  expect((await installer.ask('POST', photos, small)).status).toBe(409);
});
