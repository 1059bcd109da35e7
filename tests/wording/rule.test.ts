import { describe, expect, it } from 'vitest';
import { USUAL, type Preferences } from '@/lib/units/preferences';
import { RuleBody, type RuleBodyInput } from '@/lib/schema/rule';
import { bandWords, ruleSentence } from '@/lib/wording/rule';
import type { RuleNames } from '@/lib/wording/rule-names';
import { plainText } from '@/lib/wording/phrase';

const metric = USUAL;
const american: Preferences = { ...USUAL, temperature: 'F', clock: 12 };
const names: RuleNames = {
  channel: { label: 'Gate-heap fan', loadKind: 'motor' },
  points: [
    { key: 'bench-1', name: 'Bench probe 1', role: 'bench', unit: 'Cel' },
    { key: 'house-air', name: 'House air', role: 'house-air', unit: 'Cel' },
    { key: 'gate-base', name: 'Gate heap beside the pipe', role: 'heap-base', unit: 'Cel' },
    { key: 'gate-core', name: 'Gate heap core', role: 'heap-core', unit: 'Cel' },
    { key: 'loop-intake', name: 'Loop intake', role: 'loop-intake', unit: 'Cel' },
    { key: 'loop-return', name: 'Loop return', role: 'loop-return', unit: 'Cel' },
  ],
};
const simple: RuleBodyInput = {
  purpose: 'warm',
  point: 'bench-1',
  band: [{ from: '00:00', low: 4, high: 7 }],
};
const rest: NonNullable<RuleBodyInput['rest']> = {
  longestDraw: 1500,
  least: 1800,
  most: 3600,
  until: { point: 'gate-base', level: 43 },
  frostMayBreak: true,
};
const says = (body: RuleBodyInput, preferences: Preferences = metric, of = names) =>
  plainText(ruleSentence(RuleBody.parse(body), of, preferences)).replaceAll('\u00a0', ' ');

describe('the sentence of a rule', () => {
  it('says what starts and what stops a fan', () => {
    expect(says(simple)).toBe(
      'Run the gate-heap fan when the bench falls below 4.0 °C, stop it above 7.0 °C.',
    );
  });

  it('speaks °F to whom reads °F', () => {
    expect(says(simple, american)).toBe(
      'Run the gate-heap fan when the bench falls below 39.2 °F, stop it above 44.6 °F.',
    );
  });

  it('says draw, rest, recovery and frost', () => {
    expect(says({ ...simple, rest })).toBe(
      'Run the gate-heap fan when the bench falls below 4.0 °C, stop it above 7.0 °C. ' +
        'After 25 min of draw rest at least 30 min, then until the heap beside the pipe is back to 43 °C, 60 min at most. ' +
        'Frost may break the rest.',
    );
  });

  it('says when frost may not break the rest', () => {
    expect(says({ ...simple, rest: { ...rest, frostMayBreak: false } })).toMatch(
      /Not even frost may break the rest\.$/,
    );
  });

  it('says least gain as a difference of the reader', () => {
    const leastGain = { kelvin: 3, after: 900, intake: 'loop-intake', return: 'loop-return' };
    expect(says({ ...simple, rest: { ...rest, leastGain } })).toContain(
      'Stop a draw that brings less than 3.0 °C after 15 min.',
    );
    expect(says({ ...simple, rest: { ...rest, leastGain } }, american)).toContain(
      'less than 5.4 °F after 15 min.',
    );
  });

  it('turns the thresholds round for cooling, and opens and shuts a vent', () => {
    const vent = { ...names, channel: { label: 'Ridge vent', loadKind: 'vent' } };
    expect(
      says(
        { purpose: 'cool', point: 'house-air', band: [{ from: '00:00', low: 22, high: 26 }] },
        metric,
        vent,
      ),
    ).toBe('Open the ridge vent when the house air rises above 26.0 °C, shut it below 22.0 °C.');
  });

  it('switches a mat on and off', () => {
    const mat = { ...names, channel: { label: 'Bench mat', loadKind: 'heater' } };
    expect(says(simple, metric, mat)).toBe(
      'Switch the bench mat on when the bench falls below 4.0 °C, switch it off above 7.0 °C.',
    );
  });

  it('names each period, by the clock or the sun', () => {
    const band = [
      { from: '06:00', low: 6, high: 8 },
      { from: 'sunset-01:00', low: 4, high: 7.5 },
    ];
    expect(says({ ...simple, band })).toBe(
      'Run the gate-heap fan by the bench: from 06:00 below 6.0 °C, stop it above 8.0 °C; ' +
        'from 1 h before sunset below 4.0 °C, stop it above 7.5 °C.',
    );
    expect(says({ ...simple, band }, american)).toContain('from 6:00 am below 42.8 °F');
  });

  it('says a single period without its hour, since it holds all day', () => {
    expect(says({ ...simple, band: [{ from: '06:00', low: 4, high: 7 }] })).toBe(says(simple));
  });

  it('names stand-ins in order, with what is added', () => {
    const standIns = [{ point: 'house-air', offset: -0.5 }, { point: 'gate-core' }];
    expect(says({ ...simple, standIns })).toContain(
      'If that sensor fails, go by the house air less 0.5 °C, then by the heap’s core.',
    );
  });

  it('says season and hours', () => {
    const season = { from: '10-01', to: '04-30' };
    const hours = { from: '18:00', to: 'sunrise+00:30' };
    expect(says({ ...simple, season, hours })).toMatch(
      /Only from 1 October to 30 April, between 18:00 and 30 min after sunrise\.$/,
    );
  });

  it('uses the name of a point where two share its role', () => {
    const two = {
      ...names,
      points: [...names.points, { key: 'bench-2', name: 'Bench probe 2', role: 'bench', unit: 'Cel' }],
    };
    expect(says(simple, metric, two)).toContain('when bench probe 1 falls below');
  });

  it('names a point that is gone instead of hiding it', () => {
    expect(says({ ...simple, point: 'lost-1' })).toContain('when the missing point lost-1 falls');
  });

  it('colours its figures as their lines', () => {
    const parts = ruleSentence(RuleBody.parse({ ...simple, rest }), names, metric);
    const coloured = parts.flatMap((part) =>
      typeof part === 'string' || part.tone === 'strong'
        ? []
        : [`${part.text.replaceAll('\u00a0', ' ')} ${part.tone}`],
    );
    expect(coloured).toEqual(['4.0 °C house', '7.0 °C house', '25 min ember', '30 min ember', '43 °C base']);
  });

  it('has a band in short', () => {
    expect(bandWords(RuleBody.parse(simple), metric).replaceAll('\u00a0', ' ')).toBe('4.0 to 7.0 °C');
  });
});
