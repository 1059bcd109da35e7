import { describe, expect, it } from 'vitest';
import { clockTyped } from '@/components/rules/clock-typed';
import type { FactOf } from '@/components/rules/conditions/condition-text';
import { draftOf } from '@/components/rules/conditions/draft-tree';
import { dayTimeForm, dayTimeOf } from '@/components/rules/day-time';
import { fieldOfPath } from '@/components/rules/field-paths';
import { formOf, type RuleForm } from '@/components/rules/form-values';
import { judge } from '@/components/rules/judge';
import { RuleBody } from '@/lib/schema/rule';
import { USUAL, type Preferences } from '@/lib/units/preferences';

const american: Preferences = { ...USUAL, temperature: 'F', clock: 12 };
const body = RuleBody.parse({
  purpose: 'warm',
  point: 'bench-1',
  standIns: [{ point: 'house-air', offset: -0.5 }],
  band: [
    { from: '06:00', low: 6, high: 8 },
    { from: 'sunset-01:00', low: 4, high: 7.5 },
  ],
  rest: {
    longestDraw: 2400,
    least: 90,
    most: 5400,
    until: { point: 'gate-base', level: 43 },
    leastGain: { kelvin: 3, after: 900, intake: 'loop-intake', return: 'loop-return' },
    frostMayBreak: false,
  },
  only: {
    all: [
      { fact: 'gate-core', operator: 'greaterThanInclusive', value: 38 },
      {
        any: [
          { fact: 'time.hour', operator: 'lessThan', value: 9 },
          { not: { fact: 'time.sunUp', operator: 'equal', value: true } },
          { not: { all: [{ fact: 'time.month', operator: 'in', value: [6, 7, 8] }] } },
        ],
      },
      { fact: 'lift', operator: 'notIn', value: [2.5, 3] },
    ],
  },
  season: { from: '10-01', to: '04-30' },
  hours: { from: 'sunset-01:30', to: 'sunrise' },
});
const POINTS: Record<string, { unit: string; role: string }> = {
  'gate-core': { unit: 'Cel', role: 'heap-core' },
  lift: { unit: 'K', role: 'other' },
};
const factOf: FactOf = (fact) => POINTS[fact];
const clockAt = (clock: string) => ({ how: 'clock' as const, clock, away: '60' });
const none = draftOf(undefined, () => '');
const form = (change: Partial<RuleForm> = {}, preferences = USUAL): RuleForm => ({
  ...formOf(body, factOf, preferences),
  ...change,
});
const errorsOf = (change: Partial<RuleForm>) => judge(form(change), factOf, USUAL).errors;

describe('a rule’s form', () => {
  it.each([USUAL, american])('gives back the body it was made of, in %j', (preferences) => {
    expect(judge(form({}, preferences), factOf, preferences)).toEqual({ body, errors: {} });
  });

  it('shows temperatures and differences in the reader’s degrees', () => {
    const shown = form({}, american);
    expect([shown.band[0]?.low, shown.waitLevel, shown.gain, shown.standIns[0]?.offset]).toEqual([
      '42.8',
      '109.4',
      '5.4',
      '-0.9',
    ]);
    expect(shown.only.nodes[0]).toMatchObject({ value: '100.4' });
    expect(shown.only.nodes[2]).toMatchObject({ value: '4.5; 5.4' });
  });

  it('says at its field what cannot be read, and gives no body', () => {
    const change = { band: [{ from: clockAt(''), low: 'four', high: '7' }] };
    expect(judge(form(change), factOf, USUAL)).toMatchObject({
      body: null,
      errors: { 'band.0.low': 'Give a number in °C, such as 4.5.' },
    });
  });

  it('refuses a band that is turned over or narrower than half a degree', () => {
    expect(errorsOf({ band: [{ from: clockAt(''), low: '7', high: '4' }] })).toHaveProperty(['band.0.high']);
    expect(errorsOf({ band: [{ from: clockAt(''), low: '7', high: '7.4' }] })).toHaveProperty([
      'band.0.high',
    ]);
  });

  it('asks for the longest rest where one waits for a temperature', () => {
    expect(errorsOf({ most: '' })).toEqual({ most: 'Give minutes, such as 40, or 1 h 30, or 90 s.' });
    expect(errorsOf({ most: '1' })).toEqual({ most: 'The longest rest cannot be shorter than the least.' });
  });

  it('leaves out what is switched off, whatever stands in its fields', () => {
    const off = form({ isRationed: false, longestDraw: 'x', isSeasonal: false, isDaily: false, only: none });
    expect(judge(off, factOf, USUAL).body).toEqual({
      purpose: 'warm',
      point: 'bench-1',
      standIns: body.standIns,
      band: body.band,
    });
  });

  it('names a condition that cannot be read at its own place in the tree, and nothing else', () => {
    const only = draftOf(body.only, (fact) => (fact === 'time.hour' ? '25' : fact === 'lift' ? 'x' : '1'));
    expect(errorsOf({ only })).toEqual({
      'only.all.1.any.0.value': 'Give whole hours, 0 to 23.',
      'only.all.2.value': 'Give a number in °C, such as 4.5.',
    });
    const [first, ...others] = only.nodes;
    const unchosen = { ...only, nodes: first === undefined ? [] : [{ ...first, fact: '' }, ...others] };
    expect(errorsOf({ only: unchosen })).toMatchObject({ 'only.all.0.fact': 'Choose what it goes by.' });
  });

  it('asks for the day or month that a condition on the calendar lacks', () => {
    const only = draftOf({ not: { fact: 'time.month', operator: 'in', value: [1] } }, () => '');
    expect(errorsOf({ only })).toEqual({ 'only.all.0.not.value': 'Choose a month.' });
  });

  it('refuses days and times that are none', () => {
    expect(errorsOf({ seasonFromDay: '31', seasonFromMonth: '04' })).toEqual({
      seasonFromDay: 'That month has no such day.',
    });
    expect(errorsOf({ seasonToDay: '' })).toHaveProperty('seasonToDay');
    expect(errorsOf({ hoursFrom: clockAt('dusk') })).toHaveProperty('hoursFrom');
  });

  it('takes hostile text as text', () => {
    const errors = errorsOf({
      band: [{ from: clockAt(''), low: '<script>4</script>', high: '9'.repeat(400) }],
    });
    expect(Object.keys(errors).sort()).toEqual(['band.0.high', 'band.0.low']);
  });

  it.each([
    ['rest.until.level', 'waitLevel'],
    ['rest.longestDraw', 'longestDraw'],
    ['rest.leastGain.kelvin', 'gain'],
    ['only.all.1.value', 'only.all.1.value'],
    ['hours.to', 'hoursTo'],
    ['season.from', 'seasonFromDay'],
    ['band.0.high', 'band.0.high'],
  ])('finds the field of %s', (path, field) => expect(fieldOfPath(path)).toBe(field));
});

describe('a time of day', () => {
  it.each([
    ['8', '08:00'],
    ['8:05', '08:05'],
    ['18.30', '18:30'],
    ['6:30 pm', '18:30'],
    ['12 am', '00:00'],
    ['12pm', '12:00'],
    ['24:00', '00:00'],
    ['25:00', null],
    ['13 pm', null],
    ['7:60', null],
    ['soon', null],
    ['', null],
  ])('%j is %s', (text, time) => expect(clockTyped(text)).toBe(time));
});

describe('a time that the sun sets', () => {
  it.each(['sunset-01:00', 'sunrise+00:30', 'sunset', 'sunrise', 'sunrise-12:59', '06:00', '22:15'])(
    '%s comes back as it was',
    (text) => expect(dayTimeOf(dayTimeForm(text))).toEqual({ text }),
  );
  const away = (typed: string) => dayTimeOf({ how: 'before-sunset', clock: '', away: typed });
  it.each([
    ['1 h 30', { text: 'sunset-01:30' }],
    ['45', { text: 'sunset-00:45' }],
    ['0', { text: 'sunset' }],
    ['90 s', { error: 'Give whole minutes.' }],
    ['13 h', { error: 'At most 12 h 59 min from the sun.' }],
    ['a while', { error: 'Give minutes, such as 60, or 1 h 30.' }],
  ])('%j before sunset is %j', (typed, said) => expect(away(typed)).toEqual(said));
});
