import { describe, expect, it } from 'vitest';
import { checkNode, readSettings } from '../../scripts/start/settings.mjs';
import { ROOT } from '../../scripts/places.mjs';

describe('without any variable', () => {
  const settings = readSettings({});

  it('the usual port is tried, and may be another', () => {
    expect([settings.port, settings.portFixed]).toEqual([3000, false]);
  });
  it('the yard runs in real time', () => expect([settings.yard, settings.rate]).toEqual([true, 1]));
  it('data lie in .data of the project', () => expect(settings.dataDir).toBe(`${ROOT}/.data`));
});

it('an empty variable counts as left out', () => {
  expect(readSettings({ PORT: '', DATABASE_URL: '', YARD: '' })).toEqual(readSettings({}));
});

it('a port that is named is kept to', () => {
  expect(readSettings({ PORT: '4000' })).toMatchObject({ port: 4000, portFixed: true });
});

it.each([
  ['PORT', 'abc'],
  ['PORT', '70000'],
  ['PORT', '0'],
  ['WORKER_PORT', '1.5'],
  ['CLOCK_RATE', 'fast'],
  ['CLOCK_RATE', '0'],
  ['CLOCK_RATE', '1e9'],
  ['YARD', 'no'],
  ['TRUST_PROXY', '1'],
  ['DEMO_PASSWORD', 'too-short'],
  ['PUBLIC_URL', 'yard.example'],
  ['PUBLIC_URL', 'ftp://yard.example'],
])('a wrong %s (%s) ends the start with 78, by its name and without its value', (name, value) => {
  let said = '';
  let code: unknown;
  try {
    readSettings({ [name]: value });
  } catch (error) {
    said = error instanceof Error ? error.message : '';
    code = error instanceof Error && 'code' in error ? error.code : undefined;
  }
  expect(said).toContain(name);
  expect(said.replaceAll(name, '').includes(value) && value.length > 3).toBe(false);
  expect(code).toBe(78);
});

it.each(['18.20.0', '20.18.3'])('Node %s is refused', (version) => {
  expect(() => checkNode(version)).toThrow(`this is ${version}`);
});
it.each(['20.19.0', '20.20.2', '22.1.0', '24.0.0'])('Node %s is enough', (version) => {
  expect(checkNode(version)).toBeUndefined();
});
