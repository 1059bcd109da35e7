import { describe, expect, it } from 'vitest';
import { degreeTicks, hourTicks, spread } from '@/components/chart/axis';
import { NARROW, WIDE, type NightChart } from '@/components/chart/night-chart';
import { nightLayout } from '@/components/chart/night-layout';
import { stripBoxes } from '@/components/chart/strip';
import { USUAL } from '@/lib/units/preferences';

const from = Date.parse('2026-11-26T12:00:00Z');
const hour = 3_600_000;
const chart: NightChart = {
  ...{
    night: { from, to: from + 24 * hour },
    now: from + 18 * hour,
    zone: 'Europe/London',
    main: 'bench-1',
    frostLimit: 3,
  },
  lines: [
    {
      key: 'bench-1',
      name: 'Bench probe 1',
      role: 'bench',
      at: [from, from + hour, from + 2 * hour, from + 3 * hour],
      value: [9, null, 6, 5],
    },
    { key: 'outdoors', name: 'Outdoors', role: 'outdoors', at: [from, from + 3 * hour], value: [-4, -12] },
  ],
  bands: [
    {
      point: 'bench-1',
      channel: 'Gate-heap fan',
      purpose: 'warm',
      periods: [{ from, to: from + 24 * hour, low: 4, high: 7.5 }],
    },
    {
      point: 'bench-1',
      channel: 'Ridge vent',
      purpose: 'cool',
      periods: [{ from, to: from + 24 * hour, low: 20, high: 25 }],
    },
  ],
  strips: [
    {
      channel: 1,
      key: 'gate-heap-fan',
      label: 'Gate-heap fan',
      spans: [{ kind: 'run', from: from + 12 * hour, to: from + 13 * hour, on: true }],
    },
  ],
};
const layout = nightLayout(chart, WIDE, USUAL);

describe('the chart of a night', () => {
  it('has midnight in the middle', () =>
    expect(layout.hours.find((tick) => tick.isMidnight)?.x).toBeCloseTo((layout.x0 + layout.x1) / 2));
  it('is not stretched by the hot air of a loop, whose line leaves it and says how high it is', () => {
    const loop = { key: 'loop-return', name: 'Return', role: 'loop-return', at: [from, from + hour] };
    const hot = nightLayout(
      { ...chart, lines: [...chart.lines, { ...loop, value: [12, 31.4] }] },
      WIDE,
      USUAL,
    );
    // 9 °C is the house's highest: three degrees over it are the loop's
    expect(hot.degrees.every(({ celsius }) => celsius <= 13)).toBe(true);
    expect(hot.labels.find(({ key }) => key === 'loop-return')).toMatchObject({
      text: 'Loop return ↑ 31.4',
      y: WIDE.top + 6,
    });
  });
  it('names lines beside the plot, and two loops by their points', () => {
    const loop = (key: string, name: string) => ({
      ...{ key, name, role: 'loop-return', at: [from], value: [9] },
    });
    const lines = [...chart.lines, loop('a', 'Gate loop return'), loop('b', 'Ground loop back to the house')];
    const { labels, x1 } = nightLayout({ ...chart, lines }, WIDE, USUAL);
    expect(labels.filter(({ role }) => role === 'loop-return').map(({ text }) => text)).toEqual([
      'Gate loop return',
      'Ground loop back to…',
    ]);
    expect(labels.every(({ x }) => x > x1)).toBe(true);
  });
  it('breaks a line where readings are missing', () =>
    expect(layout.lines[0]?.path.match(/M/g)).toHaveLength(2));
  it('draws the band between its thresholds, each labelled in place', () => {
    const [band] = layout.bands;
    expect(band?.labels.map((label) => label.text)).toEqual(['off above 7.5', 'on below 4.0']);
    const value = (y: number) => {
      const [low, high] = [layout.degrees[0], layout.degrees.at(-1)];
      if (low === undefined || high === undefined) return NaN;
      return low.celsius + ((y - low.y) / (high.y - low.y)) * (high.celsius - low.celsius);
    };
    expect(
      [value(band?.y ?? 0), value((band?.y ?? 0) + (band?.height ?? 0))].map((one) => one.toFixed(3)),
    ).toEqual(['7.500', '4.000']);
  });
  it('draws a second band of the same point by name, aside from the first', () => {
    const mat = {
      point: 'bench-1',
      channel: 'Bench mat',
      purpose: 'warm' as const,
      periods: [{ ...chart.night, low: 4, high: 7 }],
    };
    const both = nightLayout({ ...chart, bands: [...chart.bands, mat] }, WIDE, USUAL).bands;
    expect(both.map((band) => [band.isMain, band.labels[0]?.text])).toEqual([
      [false, 'Bench mat: off above 7.0'],
      [true, 'off above 7.5'],
    ]);
  });
  it('draws a second band without words where it is too low for them', () => {
    const periods = [{ ...chart.night, low: 4, high: 5 }];
    const mat = { point: 'bench-1', channel: 'Bench mat', purpose: 'warm' as const, periods };
    const [second] = nightLayout({ ...chart, bands: [...chart.bands, mat] }, WIDE, USUAL).bands;
    expect([second?.isMain, second?.labels]).toEqual([false, []]);
  });
  it('leaves out a band that nothing came near', () => expect(layout.bands).toHaveLength(1));
  it('puts the strip of a run under the hours in which it ran', () => {
    const [box] = layout.strips[0]?.boxes ?? [];
    const midnight = layout.hours.find((tick) => tick.isMidnight);
    expect(box?.x).toBeCloseTo(midnight?.x ?? 0);
  });
  it('keeps now inside, and out of a night that is over', () => {
    expect(layout.now?.text).toBe('now 06:00');
    expect(nightLayout({ ...chart, now: from + 30 * hour }, WIDE, USUAL).now).toBeNull();
  });
  it('on a phone says figures at the lines, and stays inside its frame', () => {
    const narrow = nightLayout(chart, NARROW, USUAL);
    expect(narrow.labels.map((label) => label.text)).toEqual(['5.0', '−12.0']);
    expect(Math.max(...narrow.labels.map((label) => label.x))).toBeLessThan(NARROW.width - 40);
  });
  it('without a single reading still has its axes', () =>
    expect(nightLayout({ ...chart, lines: [], bands: [] }, WIDE, USUAL).degrees.length).toBeGreaterThan(2));
});

describe('the hours of a night', () => {
  const ticks = (noon: string, hours: number) => {
    const at = Date.parse(noon);
    return hourTicks(at, at + hours * hour, 'Europe/London', 3, USUAL);
  };
  it.each([
    ['of 24 h', '2026-11-26T12:00:00Z', 24],
    ['of 23 h in spring', '2026-03-28T12:00:00Z', 23],
    ['of 25 h in autumn', '2026-10-24T11:00:00Z', 25],
  ])('%s run from noon to noon by the wall', (_, noon, hours) =>
    expect(ticks(noon, hours).map((tick) => tick.label)).toEqual([
      '12:00',
      '15:00',
      '18:00',
      '21:00',
      '00:00',
      '03:00',
      '06:00',
      '09:00',
      '12:00',
    ]),
  );
});

it('degrees are round in the reader’s own unit', () => {
  const inF = degreeTicks(-13, 12, 5, { ...USUAL, temperature: 'F' });
  expect(inF.map((tick) => tick.label)).toEqual(['10', '20', '30', '40', '50 °F']);
  expect(degreeTicks(-13, 12, 5, USUAL).map((tick) => tick.label)).toEqual(['−10', '−5', '0', '5', '10 °C']);
});

it('labels that would overlap are moved apart in their order', () => {
  const moved = spread([{ y: 50 }, { y: 51 }, { y: 52 }, { y: 120 }], 13, 0, 200).map((one) => one.y);
  expect(
    moved
      .slice(1)
      .map((y, place) => y - (moved[place] ?? 0))
      .every((gap) => gap >= 12.999),
  ).toBe(true);
  expect(moved[3]).toBe(120);
});

it('a strip shows a run of a second, and leaves out what is plainly off', () => {
  const boxes = stripBoxes(
    [
      { kind: 'run', from: 0, to: 1, on: true },
      { kind: 'off', from: 1, to: 80, on: false },
      { kind: 'rest', from: 80, to: 100, on: false },
    ],
    (at) => at / 10,
  );
  expect(boxes.map((box) => [box.kind, box.x, box.width])).toEqual([
    ['run', 0, 1],
    ['rest', 8, 2],
  ]);
});
