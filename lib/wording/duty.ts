/** What the nights of a source say, for the head of Duty and for the single night that is opened. */
import { DateTime } from 'luxon';
import type { Missing, NightSummary } from '@/lib/analysis/nights';
import type { NightTotals } from '@/lib/analysis/totals';
import type { Claim } from '@/lib/control/types';
import { decimal, difference, energy, share, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { capital, countWord, counted } from './counts';
import { join, sentences } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface DutyStanding {
  source: string;
  /** Ascending by night. */
  nights: readonly NightSummary[];
  totals: NightTotals;
  frostLimitC: number | null;
  /** They were chosen among more, so that which they are must be said. */
  isPart?: boolean;
}

/** @example nightDate('2026-11-26') === '26 Nov' */
export function nightDate(night: string): string {
  return DateTime.fromISO(night, { zone: 'UTC', locale: 'en-GB' }).toFormat('d LLL');
}

/** "26 to 27 November": a night has two dates, and people remember either. */
export function nightTitle(night: string): string {
  const evening = DateTime.fromISO(night, { zone: 'UTC', locale: 'en-GB' });
  const morning = evening.plus({ days: 1 });
  return evening.month === morning.month
    ? `${evening.day} to ${morning.toFormat('d LLLL')}`
    : `${evening.toFormat('d LLLL')} to ${morning.toFormat('d LLLL')}`;
}

/**
 * @example "Over 35 nights the gate heap ran 16 % of the time and moved 140.7 ± 18.2 kWh of heat on 1.612 kWh of fan
 * power: 87 kWh for each. …"
 */
export function dutySentence(standing: DutyStanding, preferences: Preferences): Phrase[] {
  const { nights } = standing;
  const name = midSentence(standing.source);
  if (nights.length === 0) {
    return join(
      { text: `No night of the ${name} is kept yet.`, tone: 'strong' },
      ' The first is summed up as soon as a reading has come in, and grows until noon.',
    );
  }
  return sentences(
    ranSentence(standing, name),
    frostSentence(standing, preferences),
    coreSentence(nights, preferences),
  );
}

function ranSentence({ nights, totals, isPart }: DutyStanding, name: string): Phrase[] {
  const last = nights.at(-1);
  const span =
    nights.length === 1
      ? last?.complete === false
        ? 'This night so far'
        : `In the night of ${nightTitle(last?.night ?? '')}`
      : isPart === true
        ? `Over the ${nights.length} nights from ${nightDate(nights[0]?.night ?? '')} to ${nightDate(last?.night ?? '')}`
        : `Over ${nights.length} nights`;
  if (totals.onSeconds === 0)
    return join(`${span} the ${name} `, { text: 'did not run', tone: 'strong' }, '.');
  const ran = join(
    `${span} the ${name} ran `,
    { text: share(totals.dutyOfNight), tone: 'ember' },
    ' of the time',
  );
  const { heat, electricity, heatPerElectricity } = totals;
  const fan = electricity === null ? null : energy(electricity.kWh, 3);
  if (heat === null) {
    const why = missingHeat(nights);
    return join(ran, fan === null ? '.' : ` on ${fan} of electricity.`, why === null ? '' : ` ${why}`);
  }
  return join(
    ran,
    heat.kWh < 0 ? ' and took ' : ' and moved ',
    { text: energy(Math.abs(heat.kWh), 1, heat.sd), tone: 'strong' },
    heat.kWh < 0 ? ' of heat out of the house' : ' of heat',
    fan === null ? '.' : ` on ${fan} of fan power`,
    heatPerElectricity === null || fan === null || heat.kWh < 0
      ? fan === null
        ? ''
        : '.'
      : `: ${decimal(heatPerElectricity.value, 0)} kWh of heat for 1 kWh of fan.`,
    heat.nights < totals.nights
      ? ` ${capital(counted(totals.nights - heat.nights, 'night'))} could not be measured.`
      : '',
  );
}

function frostSentence({ totals, nights, frostLimitC }: DutyStanding, preferences: Preferences): Phrase[] {
  const { lowest } = totals;
  if (lowest === null) return ['No point of the house had a good reading.'];
  const place = nights.length === 1 ? '' : ` in the night of ${nightTitle(lowest.night)}`;
  const underS = totals.belowFrostLimitSeconds ?? 0;
  if (frostLimitC === null || underS === 0) {
    return join(
      'The house was lowest at ',
      { text: temperature(lowest.value, preferences), tone: 'house' },
      `${place}.`,
    );
  }
  const under = nights.filter((night) => (night.belowFrostLimitSeconds ?? 0) > 0).length;
  return join(
    'The house stood ',
    {
      text: `under its frost limit of ${temperature(frostLimitC, preferences)} for ${duration(underS)}`,
      tone: 'alarm',
    },
    nights.length === 1 ? '' : ` in ${countWord(under)} of them`,
    ', lowest at ',
    { text: temperature(lowest.value, preferences), tone: 'alarm' },
    `${place}.`,
  );
}

/** From the first dawn to the last that are known, and only where they are a week apart: less is weather. */
function coreSentence(nights: readonly NightSummary[], preferences: Preferences): Phrase[] {
  const dawns = nights.flatMap((night) => (night.coreAtDawn === null ? [] : [night.coreAtDawn]));
  const first = dawns[0];
  const last = dawns.at(-1);
  if (first === undefined || last === undefined || last.at - first.at < 6.5 * 86_400_000) return [];
  const kelvin = last.value - first.value;
  const now: Phrase = { text: temperature(last.value, preferences), tone: 'core' };
  if (Math.abs(kelvin) < 0.5) return join('The core stands at ', now, ' at dawn, as it did at first.');
  return join(
    'The core stands at ',
    now,
    ' at dawn, ',
    {
      text: `${difference(Math.abs(kelvin), preferences)} ${kelvin < 0 ? 'lower' : 'higher'}`,
      tone: 'strong',
    },
    ` than on ${nightDate(dawnDate(nights, first.at))}.`,
  );
}

function dawnDate(nights: readonly NightSummary[], at: number): string {
  return nights.find((night) => night.coreAtDawn?.at === at)?.night ?? '';
}

const missingWords: Record<Missing, string> = {
  'no-channel': 'no channel draws on it',
  'no-loop': 'it has no loop that is read at both ends',
  'no-flow': 'no air flow is entered for its fan',
  'no-readings': 'too little of it was read',
  'no-power': 'no watts are entered for its load',
  'no-limit': 'the house has no frost limit',
  'no-outdoors': 'the house has no point outdoors',
  'no-humidity': 'the house has no humidity point',
  'no-base': 'it has no point beside the pipe',
  'no-rest': 'it did not rest',
  'not-fitted': 'no rest was long enough to tell',
};

/** Why a figure is not there, in half a sentence. */
export function whyMissing(reason: Missing): string {
  return missingWords[reason];
}

function missingHeat(nights: readonly NightSummary[]): string | null {
  const reason = nights.at(-1)?.missing.heat;
  return reason === undefined ? null : `How much heat it moved is not known: ${whyMissing(reason)}.`;
}

const reasonWords: Record<Claim, { on: string; off: string }> = {
  'lock-out': { on: 'locked out', off: 'locked out' },
  interlock: { on: 'another channel needs it', off: 'an interlock keeps it off' },
  limit: { on: 'a limit', off: 'a limit stopped it' },
  proving: { on: 'being proved', off: 'proved' },
  'short-cycle': { on: 'its least on time has not passed', off: 'its least off time has not passed' },
  hand: { on: 'by hand', off: 'by hand' },
  'source-guard': { on: 'the heap', off: 'the heap is too cold, or not ready yet' },
  frost: { on: 'help against frost', off: 'it would cool a house near frost' },
  'fail-safe': { on: 'sensor missing, and it runs without its coil', off: 'sensor missing' },
  rest: { on: 'rest', off: 'the source rests' },
  band: { on: 'its band wanted it', off: 'its band' },
  idle: { on: 'nothing wanted it off', off: 'nothing wanted it on' },
};

/** A decision in few words, for the list of an opened night. @example decisionWords('off', 'rest') */
export function decisionWords(state: 'on' | 'off', claim: string): string {
  const words = isClaim(claim) ? reasonWords[claim][state] : claim;
  return `${state}: ${words}`;
}

function isClaim(text: string): text is Claim {
  return text in reasonWords;
}
