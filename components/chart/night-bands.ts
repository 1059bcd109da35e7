/** The bands of a night with their thresholds labelled in place. Pure. */
import type { WatchBand } from '@/lib/schema/watch-view';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import type { Frame, NightChart, Scale } from './night-chart';

export interface DrawnBand {
  key: string;
  isMain: boolean;
  x: number;
  width: number;
  y: number;
  height: number;
  /** At each threshold, in place; empty where the period is too short for words. */
  labels: { x: number; y: number; text: string; anchor?: 'start' | 'end' }[];
}

interface Ground {
  chart: NightChart;
  frame: Frame;
  x: Scale;
  y: Scale;
  /** °C at the bottom and the top of the plot. */
  extent: [number, number];
  /** At which end of a band its words stand. */
  calm: 'start' | 'end';
}

const INSIDE = ['house-air', 'bench'];
const NEAR_K = 3;
/** Drawing units that a threshold's words take. */
const WORDS = 84;
const NAMED_WORDS = 150;
/** A lower band than this has no room for its two thresholds beside the words of lines and of the main band. */
const TWO_LINES = 24;

/** Whether the point that a band goes by came within 3 K of where it begins, in that part of the night. */
function comesNear(chart: NightChart, band: WatchBand, period: WatchBand['periods'][number]): boolean {
  const line = chart.lines.find((one) => one.key === band.point);
  return (line?.at ?? []).some((at, place) => {
    const value = line?.value[place] ?? null;
    if (value === null || at < period.from || at >= period.to) return false;
    return band.purpose === 'warm' ? value < period.low + NEAR_K : value > period.high - NEAR_K;
  });
}

/** The main band last, so that it lies over the others. */
export function bandsOf(ground: Ground, preferences: Preferences): DrawnBand[] {
  const { chart } = ground;
  const known = new Set(chart.lines.filter((one) => INSIDE.includes(one.role)).map((one) => one.key));
  // a point may be governed twice, by a fan and a mat: the first is the house's, with all its versions of the night
  const leads = chart.bands.find((band) => band.point === chart.main && band.purpose === 'warm')?.channel;
  const isMain = (band: WatchBand) =>
    band.channel === leads && band.point === chart.main && band.purpose === 'warm';
  const drawn = chart.bands
    .filter((band) => known.has(band.point))
    .sort((one, other) => Number(isMain(one)) - Number(isMain(other)));
  const others = [...new Set(drawn.filter((band) => !isMain(band)).map((band) => band.channel))];
  return drawn.flatMap((band) =>
    band.periods.flatMap((period, place) => {
      // a band that nothing came near would only stand in the way of those that decide
      if (!isMain(band) && !comesNear(chart, band, period)) return [];
      const box = periodOf(ground, period);
      if (box === null) return [];
      const shift = isMain(band) ? 0 : (others.indexOf(band.channel) + 1) * NAMED_WORDS;
      return [
        {
          key: `${band.channel}-${band.point}-${period.from}-${place}`,
          isMain: isMain(band),
          ...box,
          labels:
            isMain(band) || (!ground.frame.namesAbove && box.height >= TWO_LINES)
              ? labelsOf(ground, band, period, { ...box, shift }, preferences)
              : [],
        },
      ];
    }),
  );
}

type Box = Pick<DrawnBand, 'x' | 'width' | 'y' | 'height'>;

function periodOf({ chart, frame, x, y, extent }: Ground, period: WatchBand['periods'][number]): Box | null {
  if (period.low > extent[1] || period.high < extent[0]) return null;
  const left = x(Math.max(period.from, chart.night.from));
  const right = x(Math.min(period.to, chart.night.to));
  if (right <= left) return null;
  const top = Math.max(y(period.high), frame.top);
  const bottom = Math.min(y(period.low), frame.top + frame.plot);
  return { x: left, width: right - left, y: top, height: bottom - top };
}

function labelsOf(
  { calm }: Ground,
  band: WatchBand,
  period: WatchBand['periods'][number],
  box: Box & { shift: number },
  preferences: Preferences,
): DrawnBand['labels'] {
  const named = box.shift === 0 ? '' : `${band.channel}: `;
  if (box.width < box.shift + (named === '' ? WORDS : NAMED_WORDS)) return [];
  const [over, under] = band.purpose === 'warm' ? ['off above', 'on below'] : ['on above', 'off below'];
  const x = calm === 'start' ? box.x + 5 + box.shift : box.x + box.width - 5 - box.shift;
  return [
    { x, anchor: calm, y: box.y - 4, text: `${named}${over} ${temperatureFigure(period.high, preferences)}` },
    {
      ...{ x, anchor: calm, y: box.y + box.height + 12 },
      text: `${named}${under} ${temperatureFigure(period.low, preferences)}`,
    },
  ];
}
