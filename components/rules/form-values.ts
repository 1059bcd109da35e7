/** A rule's body as the text of its form, in the reader's units. The way back is in form-body.ts. */
import type { RuleBody } from '@/lib/control/rule-body';
import { fieldText, type Quantity } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';
import { textOfValue, type FactOf } from './conditions/condition-text';
import { draftOf, type DraftGroup } from './conditions/draft-tree';
import { dayTimeForm, type DayTimeForm } from './day-time';

export interface RuleForm {
  purpose: 'warm' | 'cool';
  point: string;
  standIns: { point: string; offset: string }[];
  band: { from: DayTimeForm; low: string; high: string }[];
  isRationed: boolean;
  longestDraw: string;
  least: string;
  /** Empty: the rest waits for no temperature. */
  waitsAt: string;
  waitLevel: string;
  most: string;
  /** Empty: no least gain. */
  gain: string;
  gainAfter: string;
  gainIntake: string;
  gainReturn: string;
  frostMayBreak: boolean;
  only: DraftGroup;
  isSeasonal: boolean;
  seasonFromDay: string;
  seasonFromMonth: string;
  seasonToDay: string;
  seasonToMonth: string;
  isDaily: boolean;
  hoursFrom: DayTimeForm;
  hoursTo: DayTimeForm;
}

export function formOf(body: RuleBody, factOf: FactOf, preferences: Preferences): RuleForm {
  const text = (value: number | null | undefined, quantity: Quantity) =>
    fieldText(value, quantity, preferences);
  const { rest, season, hours } = body;
  const [fromMonth = '10', fromDay = '01'] = season?.from.split('-') ?? [];
  const [toMonth = '04', toDay = '30'] = season?.to.split('-') ?? [];
  return {
    purpose: body.purpose,
    point: body.point,
    standIns: body.standIns.map((one) => ({ point: one.point, offset: text(one.offset, 'difference') })),
    band: body.band.map((period) => ({
      from: dayTimeForm(period.from),
      low: text(period.low, 'temperature'),
      high: text(period.high, 'temperature'),
    })),
    isRationed: rest !== undefined,
    longestDraw: text(rest?.longestDraw ?? 2400, 'minutes'),
    least: text(rest?.least ?? 1800, 'minutes'),
    waitsAt: rest?.until?.point ?? '',
    waitLevel: text(rest?.until?.level, 'temperature'),
    most: text(rest?.most, 'minutes'),
    gain: text(rest?.leastGain?.kelvin, 'difference'),
    gainAfter: text(rest?.leastGain?.after ?? 900, 'minutes'),
    gainIntake: rest?.leastGain?.intake ?? '',
    gainReturn: rest?.leastGain?.return ?? '',
    frostMayBreak: rest?.frostMayBreak ?? true,
    only: draftOf(body.only, (fact, value) => textOfValue(fact, value, factOf, preferences)),
    isSeasonal: season !== undefined,
    seasonFromDay: String(Number(fromDay)),
    seasonFromMonth: fromMonth,
    seasonToDay: String(Number(toDay)),
    seasonToMonth: toMonth,
    isDaily: hours !== undefined,
    hoursFrom: dayTimeForm(hours?.from ?? '18:00', '18:00'),
    hoursTo: dayTimeForm(hours?.to ?? '08:00', '08:00'),
  };
}
