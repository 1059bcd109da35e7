import { describe, expect, it } from 'vitest';
import { nightAnswer } from '@/lib/analysis/night-answer';
import { summarise } from '@/lib/analysis/summarise';
import { fanDay } from '../checks/nights';
import { after, minute, night, scene, series } from './scene';

const whole = summarise(scene());

describe('a night of a source', () => {
  it('tells run, rest and starts as control decided them', () => {
    expect([whole.onSeconds, whole.restSeconds, whole.starts]).toEqual([4800, 4800, 2]);
  });

  it('takes duty of the night and duty of draw from the same seconds', () => {
    expect([whole.dutyOfNight, whole.dutyOfDraw]).toEqual([0.0556, 0.5]);
  });

  it('tells the lowest of the house with its place and time, and not the cold outdoors', () => {
    expect(whole.lowest).toEqual({ point: 'bench-1', name: 'bench-1', value: 2.5, at: after(600) });
    expect(whole.outdoorsLowest).toEqual({ value: -8, at: after(800) });
  });

  it('counts the time under the frost limit once, though two points are under it', () => {
    const cold = scene();
    const two = new Map(cold.points).set(
      'house-air',
      series('house-air', 'house-air', (m) => (m < 601 ? 2 : 6)),
    );
    expect(whole.belowFrostLimitSeconds).toBe(180);
    expect(summarise({ ...cold, points: two }).belowFrostLimitSeconds).toBe(603 * 60);
  });

  it('knows no time under the limit without a limit, or without a reading, and says why', () => {
    const input = scene();
    const none = summarise({ ...input, house: { ...input.house, frostLimitC: null } });
    const unread = summarise(scene({ points: new Map() }));
    expect([none.belowFrostLimitSeconds, none.missing.belowFrostLimit]).toEqual([null, 'no-limit']);
    expect([unread.belowFrostLimitSeconds, unread.missing.belowFrostLimit]).toEqual([null, 'no-readings']);
    // by contract a number, with no `lowest` beside it
    expect(nightAnswer(unread, 'UTC')).toMatchObject({ belowFrostLimitSeconds: 0, lowest: null });
  });

  it('reckons a fan of 12 W over a whole day as 0.288 kWh', () => {
    const input = scene();
    const [fan] = input.channels;
    if (fan === undefined) throw new Error('the scene has a fan');
    fan.record.decisions = [{ at: after(-60), state: 'on', claim: 'hand' }];
    expect(summarise(input).electricity?.kWh).toBeCloseTo(fanDay.kWh, 9);
  });

  it('ends the figures of a night that lasts at the present, so that duty is of what has passed', () => {
    const half = summarise(scene({ nowMs: after(720) }));
    expect([half.complete, half.hours, half.onSeconds]).toEqual([false, 12, 4800]);
    expect(half.dutyOfNight).toBeCloseTo(4800 / 43_200, 4);
    expect(half.coreAtDawn).toBeNull();
  });

  it('gives the core at sunrise', () => {
    // 54.2° N, 2.3° W at the end of November: the sun rises shortly after eight
    expect(whole.coreAtDawn?.value).toBe(52.13);
    expect(whole.coreAtDawn?.at).toBeGreaterThan(Date.parse('2026-11-27T07:55:00Z'));
    expect(whole.coreAtDawn?.at).toBeLessThan(Date.parse('2026-11-27T08:20:00Z'));
  });

  it.each([
    ['a loop', 'no-loop', { loop: null }],
    ['a flow', 'no-flow', { flow: null }],
    ['a flow that moves', 'no-flow', { flow: { m3PerS: 0, sdM3PerS: null, from: 'rated' } }],
  ])('has no heat without %s, and says so', (_, why, change) => {
    const input = scene();
    const summary = summarise({ ...input, channels: input.channels.map((one) => ({ ...one, ...change })) });
    expect([summary.heat, summary.missing.heat]).toEqual([null, why]);
  });

  it('has no heat where the probes were silent for more than half of the run', () => {
    const input = scene();
    const points = new Map(input.points).set(
      'loop-return',
      series('loop-return', 'loop-return', (m) => (m < 630 ? 15 : null)),
    );
    const summary = summarise({ ...input, points });
    expect([summary.heat, summary.missing.heat]).toEqual([null, 'no-readings']);
  });

  it('shows heat below nothing where the loop cooled the house', () => {
    const input = scene();
    const points = new Map(input.points).set(
      'loop-return',
      series('loop-return', 'loop-return', () => 3),
    );
    expect(summarise({ ...input, points }).heat?.kWh).toBeLessThan(0);
  });

  it('says that nothing was read where nothing was', () => {
    const summary = summarise(scene({ points: new Map() }));
    expect([summary.lowest, summary.coverage, summary.heat, summary.onSeconds]).toEqual([
      null,
      0,
      null,
      4800,
    ]);
  });

  it('covers what was read, so a probe silent half the night shows', () => {
    const input = scene();
    const points = new Map(input.points).set(
      'bench-1',
      series('bench-1', 'bench', (m) => (m < 720 ? 5 : null)),
    );
    expect(whole.coverage).toBeGreaterThan(0.999);
    expect(summarise({ ...input, points }).coverage).toBeCloseTo(1 - 0.5 / 5, 2);
  });

  it('draws strips that hold the very seconds that are told', () => {
    const run = (whole.strips[0]?.spans ?? []).filter(([, , , on]) => on);
    expect(run.reduce((sum, [, from, to]) => sum + to - from, 0)).toBe(whole.onSeconds);
  });

  it('is the same when it is made again, and when it passed through the database', () => {
    expect(JSON.parse(JSON.stringify(summarise(scene())))).toEqual(JSON.parse(JSON.stringify(whole)));
  });

  it('goes on the wire with its times in the offset of the house', () => {
    expect(nightAnswer(whole, 'Europe/Zurich').lowest?.at).toBe('2026-11-26T23:00:00+01:00');
    expect(night.from + 600 * minute).toBe(Date.parse('2026-11-26T22:00:00Z'));
  });
});
