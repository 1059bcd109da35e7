/** What heat cost, for the head of Money and for reports. */
import type { Alternative, Balance } from '@/lib/analysis/money-balance';
import type { NoPrice } from '@/lib/analysis/money-season';
import { energy } from '@/lib/units/format';
import { money, perKWh } from '@/lib/units/money';
import { between, join, sentences } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface MoneyStanding {
  source: string;
  /** Such as `2026/27`. */
  season: string;
  currency: string | null;
  balance: Balance;
}

export const ALTERNATIVE_WORDS: Record<Alternative['kind'], string> = {
  electricity: 'electricity',
  propane: 'propane',
  oil: 'heating oil',
  wood: 'wood',
};

const missing: Record<NoPrice, string> = {
  'no-heat': 'its heat is not measured',
  'heat-not-told': 'its heat is too poorly known, or none',
  'no-costs': 'none of its own costs is entered for this season',
  'no-power': 'the watts of a load are not entered',
  'no-tariff': 'no tariff covers all the hours in which it ran',
};

/** Why there is no price, in half a sentence. */
export function whyNoPrice(reason: NoPrice): string {
  return missing[reason];
}

/**
 * @example "In the season 2026/27 a kWh of heat from the gate heap has cost 0.412 ± 0.053 EUR/kWh, all in. From propane it
 * would have cost 0.198 EUR/kWh."
 */
export function moneySentence(standing: MoneyStanding): Phrase[] {
  const { balance, currency, season } = standing;
  const name = midSentence(standing.source);
  if (currency === null)
    return join(
      { text: `What the ${name}’s heat costs is not known yet.`, tone: 'strong' },
      ' Choose the currency, and enter what electricity costs.',
    );
  return sentences(
    allInSentence(balance, name, season, currency),
    fanSentence(balance, currency),
    alternativesSentence(balance.alternatives, currency),
  );
}

function allInSentence({ allIn }: Balance, name: string, season: string, currency: string): Phrase[] {
  if (typeof allIn === 'string')
    return join(
      { text: `What a kWh of heat from the ${name} costs all in is not known yet`, tone: 'strong' },
      `: ${whyNoPrice(allIn)}.`,
    );
  return join(
    `In the season ${season} a kWh of heat from the ${name} has cost `,
    { text: perKWh(allIn.perKWh, currency, allIn.sd), tone: 'ember' },
    ', all in.',
  );
}

function fanSentence({ fan, totals }: Balance, currency: string): Phrase[] {
  if (fan.micros === null || totals.electricity === null) return [];
  const heat = totals.heat === null ? '' : `, for ${energy(totals.heat.kWh, 1, totals.heat.sd)} of heat`;
  return join(
    'Its fan used ',
    `${energy(totals.electricity.kWh, 3)} for `,
    { text: money(fan.micros, currency), tone: 'strong' },
    `${heat}.`,
  );
}

function alternativesSentence(alternatives: readonly Alternative[], currency: string): Phrase[] {
  if (alternatives.length === 0) return [];
  const each = alternatives.map((one): Phrase[] => [
    `${perKWh(one.perKWh, currency)} from ${ALTERNATIVE_WORDS[one.kind]}`,
  ]);
  return join('A kWh of heat costs ', between(each, ', ', ' and '), '.');
}
