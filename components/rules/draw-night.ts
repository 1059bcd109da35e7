/** A night's lines behind the band of a rule. */
import { NARROW, WIDE, type NightChart } from '@/components/chart/night-chart';
import { nightLayout, type NightLayout } from '@/components/chart/night-layout';
import type { RuleWithVersions } from '@/lib/schema/rule-view';
import type { House, Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { dayNumber, instantOf, parseDayTime, place } from '@/lib/control/local-day';
import { nightSummary } from '@/lib/wording/night-summary';
import type { NightSun } from './drawn-band';

/** What the server drew of the night, on a wide and a narrow frame; the band is laid over it as it is typed. */
export interface DrawnNight {
  title: string;
  wide: NightLayout;
  narrow: NightLayout;
  summary: string;
  sun: NightSun;
}

export interface NightOfRule {
  house: House;
  rule: RuleWithVersions;
  points: Point[];
  night: { name: string; from: number; to: number };
  readings: { point: string; at: number[]; value: number[] }[];
}

/** Draws the night on the server; the editor lays the band over it. Null where nothing was read in it. */
export function drawNight(data: NightOfRule, now: number, preferences: Preferences): DrawnNight | null {
  const { house, rule, night, points } = data;
  const shown = new Set([
    rule.body.point,
    ...points.filter((one) => one.role === 'outdoors').map((one) => one.key),
  ]);
  const lines = data.readings
    .filter((one) => shown.has(one.point) && one.at.length > 0)
    .map((one) => {
      const point = points.find((other) => other.key === one.point);
      return {
        key: one.point,
        name: point?.name ?? one.point,
        role: point?.role ?? 'other',
        at: one.at,
        value: one.value,
      };
    });
  if (lines.length === 0) return null;
  const { from, to } = night;
  const chart: NightChart = {
    ...{ night: { from, to }, now, zone: house.zone, lines, strips: [], main: rule.body.point },
    frostLimit: house.frostLimit,
    // for the extent only: the editor draws the band itself
    bands: [
      {
        point: rule.body.point,
        channel: rule.channel,
        purpose: 'warm',
        periods: rule.body.band.map(({ low, high }) => ({ from, to, low, high })),
      },
    ],
  };
  const frame = (base: typeof WIDE) => ({ ...nightLayout(chart, base, preferences), bands: [] });
  return {
    title: `${day(from, house.zone)} to ${day(to, house.zone)}, noon to noon`,
    wide: frame(WIDE),
    narrow: frame(NARROW),
    summary: nightSummary(chart, preferences),
    sun: sunOf(house, from),
  };
}

function sunOf(house: House, from: number): NightSun {
  const where = place(house);
  const evening = dayNumber(where, from);
  const after = (day: number, what: 'sunset' | 'sunrise') => {
    const at = instantOf(where, day, parseDayTime(what));
    return at === null ? null : (at - from) / 60_000;
  };
  return { sunset: after(evening, 'sunset'), sunrise: after(evening + 1, 'sunrise') };
}
