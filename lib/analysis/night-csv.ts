/** Nights as comma-separated values (RFC 4180), for a spreadsheet: one row a night and source, units in the heads. */
import { DateTime } from 'luxon';
import { csvLine, type CsvCell } from '@/lib/units/csv';
import type { NightSummary } from './nights';

const COLUMNS: [head: string, of: (night: NightSummary, time: (at: number) => string) => CsvCell][] = [
  ['night', (night) => night.night],
  ['source', (night) => night.source],
  ['complete', (night) => night.complete],
  ['hours_h', (night) => night.hours],
  ['on_s', (night) => night.onSeconds],
  ['rest_s', (night) => night.restSeconds],
  ['duty_of_night', (night) => night.dutyOfNight],
  ['duty_of_draw', (night) => night.dutyOfDraw],
  ['starts', (night) => night.starts],
  ['heat_kWh', (night) => night.heat?.kWh ?? null],
  ['heat_sd_kWh', (night) => night.heat?.sd ?? null],
  ['electricity_kWh', (night) => night.electricity?.kWh ?? null],
  ['lowest_C', (night) => night.lowest?.value ?? null],
  ['lowest_point', (night) => night.lowest?.point ?? null],
  ['lowest_at', (night, time) => (night.lowest ? time(night.lowest.at) : null)],
  ['below_frost_limit_s', (night) => night.belowFrostLimitSeconds],
  ['outdoors_lowest_C', (night) => night.outdoorsLowest?.value ?? null],
  ['core_at_dawn_C', (night) => night.coreAtDawn?.value ?? null],
  ['coverage', (night) => night.coverage],
  ['held_s', (night) => night.heldSeconds],
  ['hand_s', (night) => night.handSeconds],
  ['heat_assumed_running', (night) => night.heat?.assumedRunning ?? null],
  ['heat_measured', (night) => night.heatMeasured],
  ['heat_for_power', (night) => night.heatForPower?.ratio ?? null],
  ['heat_for_power_sd', (night) => night.heatForPower?.sd ?? null],
  ['lift_K_h', (night) => night.liftDegreeHours],
  ['over_90_percent_h', (night) => night.over90Hours],
  ['under_dew_point_h', (night) => night.underDewPointHours],
  ['tau_s', (night) => night.recovery?.tau ?? null],
  ['tau_sd_s', (night) => night.recovery?.tauSd ?? null],
  ['level_C', (night) => night.recovery?.level ?? null],
  ['level_sd_C', (night) => night.recovery?.levelSd ?? null],
  ['rests_fitted', (night) => night.recovery?.rests ?? null],
  ['heat_electricity_kWh', (night) => night.heatElectricity?.kWh ?? null],
];

/** Figures exactly as the interface tells them; what is not known is empty. Lines end in CR LF. */
export function nightsCsv(nights: readonly NightSummary[], zone: string): string {
  const time = (at: number) => DateTime.fromMillis(at, { zone }).toISO({ suppressMilliseconds: true }) ?? '';
  const rows = nights.map((night) => csvLine(COLUMNS.map(([, of]) => of(night, time))));
  return csvLine(COLUMNS.map(([head]) => head)) + rows.join('');
}
