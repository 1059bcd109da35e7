import { describe, expect, it } from 'vitest';
import { USUAL, type Preferences } from '@/lib/units/preferences';
import { RuleBody, type RuleBodyInput } from '@/lib/schema/rule';
import { changeWords, ruleChanges } from '@/lib/wording/rule-changes';

const metric = USUAL;
const names = {
  channel: { label: 'Gate-heap fan', loadKind: 'motor' },
  points: [
    { key: 'bench-1', name: 'Bench probe 1', role: 'bench', unit: 'Cel' },
    { key: 'house-air', name: 'House air', role: 'house-air', unit: 'Cel' },
    { key: 'gate-base', name: 'Gate base', role: 'heap-base', unit: 'Cel' },
  ],
};
const base: RuleBodyInput = {
  purpose: 'warm',
  point: 'bench-1',
  band: [{ from: '00:00', low: 4, high: 7.5 }],
};
const changes = (before: RuleBodyInput, after: RuleBodyInput, preferences: Preferences = metric) =>
  ruleChanges(RuleBody.parse(before), RuleBody.parse(after), names, preferences).map((change) =>
    changeWords(change).replaceAll('\u00a0', ' '),
  );

describe('the comparison of two versions', () => {
  it('says nothing where nothing changed', () => expect(changes(base, base)).toEqual([]));

  it('names the threshold and says the unit once', () => {
    const after = { ...base, band: [{ from: '00:00', low: 4, high: 8 }] };
    expect(changes(base, after)).toEqual(['off above: 7.5 → 8.0 °C']);
    expect(changes(base, after, { ...USUAL, temperature: 'F' })).toEqual(['off above: 45.5 → 46.4 °F']);
  });

  it('says what came and what went', () => {
    const rest = { longestDraw: 1500, least: 1800 };
    expect(changes(base, { ...base, rest })).toEqual([
      'longest draw: none before, now 25 min',
      'rest at least: none before, now 30 min',
      'frost may break a rest: none before, now yes',
    ]);
    expect(changes({ ...base, rest }, base)[0]).toBe('longest draw: no longer (was 25 min)');
  });

  it('keeps both units where they differ', () => {
    expect(
      changes(
        { ...base, rest: { longestDraw: 90, least: 1800 } },
        { ...base, rest: { longestDraw: 1500, least: 1800 } },
      ),
    ).toEqual(['longest draw: 90 s → 25 min']);
  });

  it('says of a second period what it adds, and nothing of the first', () => {
    const two = [...base.band, { from: 'sunset-01:00', low: 5, high: 8 }];
    expect(changes(base, { ...base, band: two })).toEqual([
      'on below from 1 h before sunset: none before, now 5.0 °C',
      'off above from 1 h before sunset: none before, now 8.0 °C',
    ]);
    expect(changes(base, { ...base, band: [{ from: '06:00', low: 4, high: 7.5 }] })).toEqual([]);
  });

  it('matches periods by when they begin, not by their place in the list', () => {
    const before = {
      ...base,
      band: [
        { from: '06:00', low: 6, high: 8 },
        { from: '22:00', low: 4, high: 7 },
      ],
    };
    const after = {
      ...base,
      band: [
        { from: '22:00', low: 4, high: 7 },
        { from: '06:00', low: 5, high: 8 },
      ],
    };
    expect(changes(before, after)).toEqual(['on below from 06:00: 6.0 → 5.0 °C']);
  });

  it('says points, stand-ins, season, hours and conditions', () => {
    const after: RuleBodyInput = {
      ...base,
      point: 'house-air',
      standIns: [{ point: 'bench-1', offset: 0.5 }],
      season: { from: '10-01', to: '04-30' },
      hours: { from: '18:00', to: '08:00' },
      only: { all: [{ fact: 'gate-base', operator: 'greaterThan', value: 40 }] },
    };
    expect(changes(base, after)).toEqual([
      'measured at: the bench → the house air',
      'if that fails: none before, now the bench +0.5 °C',
      'only while: none before, now the heap beside the pipe is above 40.0 °C',
      'season: none before, now 1 October to 30 April',
      'daily hours: none before, now 18:00 to 08:00',
    ]);
  });
});
