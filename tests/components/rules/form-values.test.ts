import { describe, expect, it } from 'vitest';
import { clockTyped } from '@/components/rules/clock-typed';
import { fieldOfPath, fitsForm, formOf, type RuleForm } from '@/components/rules/form-values';
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
      { fact: 'time.hour', operator: 'lessThan', value: 9 },
      { fact: 'time.sunUp', operator: 'equal', value: false },
    ],
  },
  season: { from: '10-01', to: '04-30' },
  hours: { from: '18:00', to: '08:00' },
});
const unitOf = (fact: string) => (fact === 'gate-core' ? 'Cel' : undefined);
const form = (change: Partial<RuleForm> = {}, preferences = USUAL): RuleForm => ({
  ...formOf(body, unitOf, preferences),
  ...change,
});
const errorsOf = (change: Partial<RuleForm>) => judge(form(change), null, unitOf, USUAL).errors;

describe('a rule’s form', () => {
  it.each([USUAL, american])('gives back the body it was made of, in %j', (preferences) => {
    expect(judge(form({}, preferences), null, unitOf, preferences)).toEqual({ body, errors: {} });
  });

  it('shows temperatures and differences in the reader’s degrees', () => {
    const shown = form({}, american);
    expect([
      shown.band[0]?.low,
      shown.waitLevel,
      shown.gain,
      shown.standIns[0]?.offset,
      shown.only[0]?.value,
    ]).toEqual(['42.8', '109.4', '5.4', '-0.9', '100.4']);
  });

  it('says at its field what cannot be read, and gives no body', () => {
    const change = { band: [{ from: '', low: 'four', high: '7' }] };
    expect(judge(form(change), null, unitOf, USUAL)).toMatchObject({
      body: null,
      errors: { 'band.0.low': 'Give a number in °C, such as 4.5.' },
    });
  });

  it('refuses a band that is turned over or narrower than half a degree', () => {
    expect(errorsOf({ band: [{ from: '', low: '7', high: '4' }] })).toHaveProperty(['band.0.high']);
    expect(errorsOf({ band: [{ from: '', low: '7', high: '7.4' }] })).toHaveProperty(['band.0.high']);
  });

  it('asks for the longest rest where one waits for a temperature', () => {
    expect(errorsOf({ most: '' })).toEqual({ most: 'Give minutes, such as 40, or 1 h 30, or 90 s.' });
    expect(errorsOf({ most: '1' })).toEqual({ most: 'The longest rest cannot be shorter than the least.' });
  });

  it('leaves out what is switched off, whatever stands in its fields', () => {
    const off = form({ isRationed: false, longestDraw: 'x', isSeasonal: false, isDaily: false, only: [] });
    expect(judge(off, null, unitOf, USUAL).body).toEqual({
      purpose: 'warm',
      point: 'bench-1',
      standIns: body.standIns,
      band: body.band,
    });
  });

  it('keeps conditions that it cannot show', () => {
    const only = { any: [{ fact: 'gate-core', operator: 'lessThan', value: 50 } as const] };
    expect(fitsForm(only)).toBe(false);
    expect(judge(form({ only: [] }), only, unitOf, USUAL).body?.only).toEqual(only);
  });

  it('refuses days and times that are none', () => {
    expect(errorsOf({ seasonFromDay: '31', seasonFromMonth: '04' })).toEqual({
      seasonFromDay: 'That month has no such day.',
    });
    expect(errorsOf({ seasonToDay: '' })).toHaveProperty('seasonToDay');
    expect(errorsOf({ hoursFrom: 'dusk' })).toHaveProperty('hoursFrom');
  });

  it('takes hostile text as text', () => {
    const errors = errorsOf({ band: [{ from: '', low: '<script>4</script>', high: '9'.repeat(400) }] });
    expect(Object.keys(errors).sort()).toEqual(['band.0.high', 'band.0.low']);
  });

  it.each([
    ['rest.until.level', 'waitLevel'],
    ['rest.longestDraw', 'longestDraw'],
    ['rest.leastGain.kelvin', 'gain'],
    ['only.all.1.value', 'only.1.value'],
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
