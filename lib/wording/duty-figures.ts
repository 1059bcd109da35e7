/** The figures of nights as pages, reports and letters show them, from one place, so that they agree. */
import type { NightSummary } from '@/lib/analysis/nights';
import { totalOf } from '@/lib/analysis/totals';
import {
  count,
  decimal,
  difference,
  energy,
  share,
  temperature,
  temperatureFigure,
  UNKNOWN,
} from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock, duration } from '@/lib/units/time';
import { nightDate, whyMissing } from './duty';

export interface FigureRow {
  name: string;
  value: string;
  note?: string;
}

/** The figures of one night or of several, from the very totals that the table and the sentence show. */
export function nightFigures(
  nights: readonly NightSummary[],
  zone: string,
  frostLimitC: number | null,
  preferences: Preferences,
): FigureRow[] {
  const totals = totalOf(nights);
  const last = nights.at(-1);
  const { heat, electricity, heatPerElectricity: gain, lowest, outdoorsLowest } = totals;
  const why = last?.missing.heat;
  // one night's lowest is told with its time, that of several with its night
  const when = (at: number, night: string) =>
    nights.length === 1 ? clock(at, zone, preferences) : nightDate(night);
  const rows: (FigureRow | null)[] = [
    { name: 'Ran', value: `${hours(totals.onSeconds)}, ${count(totals.starts, 'start')}` },
    { name: 'Rested', value: hours(totals.restSeconds) },
    totals.heldSeconds === 0 ? null : { name: 'Held', value: hours(totals.heldSeconds) },
    totals.handSeconds === 0 ? null : { name: 'By hand', value: hours(totals.handSeconds) },
    totals.dutyOfDraw === null ? null : { name: 'Ran, of run and rest', value: share(totals.dutyOfDraw) },
    heat === null
      ? { name: 'Heat', value: UNKNOWN, ...(why === undefined ? {} : { note: whyMissing(why) }) }
      : { name: 'Heat', value: energy(heat.kWh, 1, heat.sd) },
    electricity === null ? null : { name: 'Electricity', value: energy(electricity.kWh, 3) },
    gain === null
      ? null
      : { name: 'Heat for 1 kWh of fan', value: `${decimal(gain.value, 0)} ± ${decimal(gain.sd, 0)} kWh` },
    lowest === null
      ? { name: 'Lowest in the house', value: UNKNOWN, note: whyMissing('no-readings') }
      : {
          name: 'Lowest in the house',
          value: `${temperature(lowest.value, preferences)}, ${when(lowest.at, lowest.night)}`,
        },
    frostLimitC === null
      ? null
      : {
          name: `Under ${temperature(frostLimitC, preferences)}`,
          value: totals.belowFrostLimitSeconds === null ? UNKNOWN : hours(totals.belowFrostLimitSeconds),
        },
    outdoorsLowest === null
      ? null
      : { name: 'Lowest outdoors', value: temperature(outdoorsLowest.value, preferences) },
  ];
  return rows.filter((row) => row !== null);
}

/** What only an opened night tells; what is not known says why. */
export function openedFigures(night: NightSummary, zone: string, preferences: Preferences): FigureRow[] {
  const { coreAtDawn: core, recovery, missing } = night;
  const known = (
    name: string,
    value: string | null,
    why: keyof NightSummary['missing'],
    note?: string,
  ): FigureRow => {
    const reason = missing[why];
    if (value !== null) return { name, value, ...(note === undefined ? {} : { note }) };
    return { name, value: UNKNOWN, ...(reason === undefined ? {} : { note: whyMissing(reason) }) };
  };
  const hoursOf = (value: number | null) => (value === null ? null : hours(value * 3600));
  return [
    ...(core === null
      ? []
      : [
          {
            name: 'Core at dawn',
            value: `${temperature(core.value, preferences)}, ${clock(core.at, zone, preferences)}`,
          },
        ]),
    known(
      'Regains two thirds in',
      recovery === null ? null : `${duration(recovery.tau)} ± ${duration(recovery.tauSd)}`,
      'recovery',
      recovery === null ? undefined : `from ${count(recovery.rests, 'rest')}`,
    ),
    known(
      'Warmer than outdoors by',
      night.liftDegreeHours === null || night.hours === 0
        ? null
        : `${difference(night.liftDegreeHours / night.hours, preferences)} on the mean`,
      'liftDegreeHours',
    ),
    known('Over 90\u00a0% humidity', hoursOf(night.over90Hours), 'over90Hours'),
    known('At or under the dew point', hoursOf(night.underDewPointHours), 'underDewPointHours'),
    { name: 'Read', value: share(night.coverage, 1), note: 'of what was to be read' },
  ];
}

/** Many nights are told in hours throughout: "5 days" of a fan would not be read as a sum of runs. */
function hours(seconds: number): string {
  return seconds < 48 * 3600 ? duration(seconds) : `${decimal(seconds / 3600, 0)}\u00a0h`;
}

export interface NightCells {
  ran: string;
  starts: number;
  /** Left out where it is not known. */
  heat?: string;
  lowest?: string;
  outdoors?: string;
}

/** A night's figures as they stand in its row. */
export function nightCells(night: NightSummary, preferences: Preferences): NightCells {
  const figure = (one: { value: number }) => temperatureFigure(one.value, preferences);
  return {
    ran: share(night.dutyOfNight),
    starts: night.starts,
    ...(night.heat === null ? {} : { heat: decimal(night.heat.kWh, 1) }),
    ...(night.lowest === null ? {} : { lowest: figure(night.lowest) }),
    ...(night.outdoorsLowest === null ? {} : { outdoors: figure(night.outdoorsLowest) }),
  };
}
