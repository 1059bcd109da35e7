/** Time at temperature in words and figures: rounded down, so that no rounding lifts a spell over a limit. */
import { HOT_C, ORGANIC_FROM_C, ORGANIC_TO_C, WARM_C } from '@/lib/analysis/hygiene';
import type { HeatRecord, RuleName, RuleRecord } from '@/lib/analysis/hygiene';
import { decimal, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { longDay } from './heap';

const space = '\u00a0';

/** Whole hours, or tenths under ten, cut off: 71.97 h is no 72. @example hours(71.97) === '71 h' */
export function hours(value: number): string {
  const cut = value < 10 ? Math.floor(value * 10 + 1e-9) / 10 : Math.floor(value + 1e-9);
  return `${decimal(cut, Number.isInteger(cut) ? 0 : 1)}${space}h`;
}

const degrees = (celsius: number, preferences: Preferences) =>
  temperature(celsius, preferences, Number.isInteger(celsius) || preferences.temperature === 'F' ? 0 : 1);

export function heatRows(heat: HeatRecord, zone: string, preferences: Preferences) {
  const at = (celsius: number) => degrees(celsius, preferences);
  return [
    { name: `${at(HOT_C)} or more, core`, value: hours(heat.hoursFromHot) },
    { name: `Longest spell from ${at(HOT_C)}`, value: hours(heat.longestHot?.hours ?? 0) },
    { name: `Turnings while from ${at(HOT_C)}`, value: String(heat.turningsWhileHot) },
    ...(heat.hoursOverTop > 0
      ? [{ name: `Over ${at(ORGANIC_TO_C)}`, value: hours(heat.hoursOverTop), note: 'does not count' }]
      : []),
    {
      name: 'Hottest ever read',
      value: `${temperature(heat.hottestC, preferences)}, ${longDay(heat.hottestAt, zone)}`,
    },
    ...(heat.silentHours >= 0.5
      ? [{ name: 'Not read', value: hours(heat.silentHours), note: 'the probe was silent' }]
      : []),
  ];
}

export interface RuleRow {
  name: string;
  measured: string;
  note: string;
}

export function ruleRows(heat: HeatRecord, preferences: Preferences): RuleRow[] {
  return heat.rules.map((rule) => ({
    name: nameOf(rule.rule, preferences),
    measured: measured(rule),
    note: `${noteOf(rule.rule, preferences)} ${rule.isReached ? 'Its figures were reached at this probe.' : 'Its figures were not reached at this probe.'}`,
  }));
}

function measured({ hours: made, ofHours, turnings, hoursOverHot }: RuleRecord): string {
  return [
    `${hours(made)} of ${ofHours}${space}h`,
    turnings === null ? null : `${turnings.made} of ${turnings.of} turnings`,
    hoursOverHot === null ? null : `${hours(hoursOverHot.made)} of ${hoursOverHot.of}${space}h hot`,
  ]
    .filter((part) => part !== null)
    .join(', ');
}

function nameOf(rule: RuleName, preferences: Preferences): string {
  const at = (celsius: number) => degrees(celsius, preferences);
  switch (rule) {
    case 'still':
      return `${at(HOT_C)} for 3 days`;
    case 'windrow':
      return `${at(HOT_C)} for 15 days, 5 turnings`;
    case 'five-days':
      return `${at(WARM_C)} for 5 days, 4 h over ${at(HOT_C)}`;
    case 'organic-still':
      return `${at(ORGANIC_FROM_C)} to ${at(ORGANIC_TO_C)} for 3 days`;
    case 'organic-windrow':
      return `${at(ORGANIC_FROM_C)} to ${at(ORGANIC_TO_C)} for 15 days, 5 turnings`;
  }
}

function noteOf(rule: RuleName, preferences: Preferences): string {
  switch (rule) {
    case 'still':
      return 'In a vessel or an aerated static pile (40 CFR 503, appendix B). A heap that is drawn on is neither.';
    case 'windrow':
      return 'In a windrow (40 CFR 503, appendix B).';
    case 'five-days':
      return 'Significant reduction only (40 CFR 503, appendix B).';
    case 'organic-still':
      return 'In a vessel or an aerated static pile, begun at 25 to 40 : 1 (7 CFR 205.203).';
    case 'organic-windrow':
      return `In a windrow, begun at 25 to 40 : 1 (7 CFR 205.203). Time over ${degrees(ORGANIC_TO_C, preferences)} does not count.`;
  }
}
