/** Where everything of a noon-to-noon chart stands, in drawing units. Pure, so that it can be tested without a browser. */
import { scaleLinear } from 'd3-scale';
import { line as pathOf } from 'd3-shape';
import type { WatchLine } from '@/lib/schema/watch-view';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { degreeTicks, hourTicks, spread, type DegreeTick, type HourTick } from './axis';
import { bandsOf, type DrawnBand } from './night-bands';
import type { Frame, NightChart, Scale } from './night-chart';
import { stripBoxes, type StripBox } from './strip';

export interface DrawnLine {
  key: string;
  role: string;
  isMain: boolean;
  /** Which of its role this is, from 0: later ones are dashed. */
  rank: number;
  path: string;
}

export interface NightLayout {
  frame: Frame;
  height: number;
  x0: number;
  x1: number;
  yTop: number;
  yBottom: number;
  hours: (HourTick & { x: number })[];
  degrees: (DegreeTick & { y: number })[];
  bands: DrawnBand[];
  frost: { x: number; y: number; text: string; anchor: 'start' | 'end' } | null;
  lines: DrawnLine[];
  labels: { key: string; role: string; isMain: boolean; text: string; x: number; y: number }[];
  strips: { key: string; name: string; y: number; boxes: StripBox[] }[];
  now: { x: number; text: string; anchor: 'start' | 'end' } | null;
}

/** K over everything else that a loop's air may show; hotter, it leaves the chart at its top. */
const LOOP_ROOM_K = 3;

/**
 * °C between which the chart spans: the lines and the bands that warm, never less than 8 K. A loop's air does not
 * stretch it: at 30 °C it would press the house's own few degrees, which the chart is for, into a hair.
 */
export function extentOf(chart: Pick<NightChart, 'lines' | 'bands' | 'frostLimit'>): [number, number] {
  const valuesOf = (lines: WatchLine[]) =>
    lines.flatMap((one) => one.value.filter((value) => value !== null));
  const loops = valuesOf(chart.lines.filter(isLoop));
  const values = [
    ...valuesOf(chart.lines.filter((one) => !isLoop(one))),
    ...chart.bands
      .filter((band) => band.purpose === 'warm')
      .flatMap((band) => band.periods.flatMap((period) => [period.low, period.high])),
    ...(chart.frostLimit === null ? [] : [chart.frostLimit]),
  ];
  if (values.length + loops.length === 0) return [-5, 15];
  const others = values.length === 0 ? loops : values;
  const least = Math.min(...others, ...loops);
  const highest = Math.max(...others);
  const greatest = Math.max(highest, Math.min(Math.max(...loops), highest + LOOP_ROOM_K));
  const lack = Math.max(0, 8 - (greatest - least)) / 2;
  return [Math.floor(least - lack - 0.5), Math.ceil(greatest + lack + 0.5)];
}

const isLoop = (one: WatchLine) => one.role === 'loop-return';

export function nightLayout(chart: NightChart, frame: Frame, preferences: Preferences): NightLayout {
  const { from, to } = chart.night;
  const [least, greatest] = extentOf(chart);
  const x1 = frame.width - frame.right;
  const yBottom = frame.top + frame.plot;
  const x = scaleLinear([from, to], [frame.left, x1]);
  const y = scaleLinear([least, greatest], [yBottom, frame.top]);
  const nowIn = chart.now > from && chart.now < to;
  const stripsTop = yBottom + (frame.namesAbove ? 30 : 16);
  // words stand where the lines are not: early in a night at its end, later at its beginning
  const calm = nowIn && chart.now - from < (to - from) / 2 ? 'end' : 'start';
  const height = stripsTop + chart.strips.length * frame.stripStep + 18;
  return {
    frame,
    height,
    x0: frame.left,
    x1,
    yTop: frame.top,
    yBottom,
    hours: hourTicks(from, to, chart.zone, frame.everyHours, preferences).map((tick) => ({
      ...tick,
      x: x(tick.at),
    })),
    degrees: degreeTicks(least, greatest, 5, preferences).map((tick) => ({ ...tick, y: y(tick.celsius) })),
    bands: bandsOf({ chart, frame, x, y, extent: [least, greatest], calm }, preferences),
    frost:
      chart.frostLimit === null
        ? null
        : {
            ...(calm === 'start' ? { x: x1 - 3, anchor: 'end' } : { x: frame.left + 4, anchor: 'start' }),
            y: y(chart.frostLimit),
            text: `frost limit ${temperatureFigure(chart.frostLimit, preferences)}`,
          },
    lines: chart.lines.map((one) => drawn(one, chart, x, y)),
    labels: labelsOf(chart, x, y, frame, preferences),
    strips: chart.strips.map((strip, place) => ({
      key: strip.key,
      name: strip.label,
      y: stripsTop + place * frame.stripStep,
      boxes: stripBoxes(strip.spans, x),
    })),
    now: nowIn
      ? {
          x: x(chart.now),
          text: `now ${clock(chart.now, chart.zone, preferences)}`,
          anchor: x(chart.now) > frame.width - 90 ? 'end' : 'start',
        }
      : null,
  };
}

function drawn(one: WatchLine, chart: NightChart, x: Scale, y: Scale): DrawnLine {
  const rank = chart.lines.filter((other) => other.role === one.role).indexOf(one);
  const places = one.at.map((at, place) => ({ at, value: one.value[place] ?? null }));
  const path = pathOf<(typeof places)[number]>()
    .defined((place) => place.value !== null)
    .x((place) => x(place.at))
    .y((place) => y(place.value ?? 0))
    .digits(1)(places);
  return { key: one.key, role: one.role, isMain: one.key === chart.main, rank, path: path ?? '' };
}

/** As many letters as stand beside the plot of a wide frame. */
const BESIDE = 20;

/** As much of a name as there is room for. */
export const shortened = (name: string, most = BESIDE) =>
  name.length > most ? `${name.slice(0, most - 1)}…` : name;

/** A line's name stands beside the plot at the height where the line ends, clear of the words of bands within. */
function labelsOf(chart: NightChart, x: Scale, y: Scale, frame: Frame, preferences: Preferences) {
  const items = chart.lines.flatMap((one) => {
    const last = one.value.findLastIndex((value) => value !== null);
    const [at, value] = [one.at[last], one.value[last]];
    if (at === undefined || value === undefined || value === null) return [];
    const figure = temperatureFigure(value, preferences);
    // a line that left the chart says how high it is
    const out = y(value) < frame.top ? ` ↑ ${figure}` : '';
    return [
      {
        ...{ key: one.key, role: one.role, isMain: one.key === chart.main, y: y(value) },
        // on a phone the colour and the place say which; the name would run over the lines
        text: frame.namesAbove ? figure : `${shortened(nameOf(one, chart), BESIDE - out.length)}${out}`,
        x: frame.namesAbove ? x(at) + 5 : frame.width - frame.right + 6,
      },
    ];
  });
  return spread(items, 13, frame.top + 6, frame.top + frame.plot - 2);
}

function nameOf(one: WatchLine, chart: NightChart): string {
  if (chart.lines.some((other) => other.key !== one.key && other.role === one.role)) return one.name;
  return one.role === 'outdoors' ? 'Outdoors' : one.role === 'loop-return' ? 'Loop return' : one.name;
}
