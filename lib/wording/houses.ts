/** How all houses of a holding stand, for the head of their page. */
import type { CoreTrend } from '@/lib/analysis/core';
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration } from '@/lib/units/time';
import { capital, counted } from './counts';
import { between, join, sentences } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export interface HouseFacts {
  name: string;
  frostLimit: number | null;
  /** The coldest point of the house that is good, now. */
  coldest: number | null;
  alarms: number;
  lastLowest: number | null;
  fallingCores: string[];
  isLaidUp: boolean;
}

/** Those that are laid up last. Worst first: open alarms, then under the frost limit now or last night, falling cores, and how near the limit is. */
export function worstOf<House extends HouseFacts>(houses: readonly House[]): House[] {
  const under = ({ frostLimit }: House, value: number | null) =>
    Number(value !== null && frostLimit !== null && value < frostLimit);
  const room = ({ coldest, frostLimit }: House) =>
    coldest === null ? -Infinity : coldest - (frostLimit ?? 0);
  const weights = (house: House) => [
    -Number(house.isLaidUp),
    house.alarms,
    under(house, house.coldest),
    under(house, house.lastLowest),
    house.fallingCores.length,
    -room(house),
  ];
  return houses.toSorted((one, other) => {
    const [a, b] = [weights(one), weights(other)];
    return a.map((weight, place) => (b[place] ?? 0) - weight).find((gap) => gap !== 0) ?? 0;
  });
}

/**
 * @param ofHolding open alarms that are no house's own
 * @param houses worst first
 * @example "The prop house asks for you first: one open alarm, and it came down to 1.2 °C last night. The other house holds."
 */
export function housesSentence(
  houses: readonly HouseFacts[],
  ofHolding: number,
  preferences: Preferences,
): Phrase[] {
  if (houses.length === 0) return [{ text: 'There is no house yet.', tone: 'strong' }];
  return sentences(
    ofHolding === 0
      ? []
      : [
          {
            text: `${capital(counted(ofHolding, 'alarm'))} ${ofHolding === 1 ? 'is' : 'are'} of the holding as a whole.`,
            tone: 'alarm',
          },
        ],
    ofHouses(
      houses.filter((house) => !house.isLaidUp),
      ofHolding,
      preferences,
    ),
    laidUp(houses.filter((house) => house.isLaidUp)),
  );
}

function laidUp(houses: readonly HouseFacts[]): Phrase[] {
  if (houses.length === 0) return [];
  const names = houses.map((house) => midSentence(house.name)).join(', the ');
  return [`Nobody controls the ${names}: ${houses.length === 1 ? 'it is' : 'they are'} laid up.`];
}

function ofHouses(houses: readonly HouseFacts[], ofHolding: number, preferences: Preferences): Phrase[] {
  if (houses.length === 0) return [{ text: 'No house is in service.', tone: 'strong' }];
  const wanting = houses.filter((house) => needs(house, preferences).length > 0);
  const [worst] = wanting;
  if (worst === undefined) return allHold(houses, ofHolding, preferences);
  const others = wanting.slice(1).map((house) => midSentence(house.name));
  const rest = houses.length - wanting.length;
  return sentences(
    join(
      { text: `The ${midSentence(worst.name)} asks for you first: `, tone: 'strong' },
      ...between(needs(worst, preferences), ', ', ' and '),
      '.',
    ),
    others.length === 0 ? [] : join(`Then the ${others.join(', the ')}.`),
    rest === 0
      ? []
      : [
          rest === 1 && houses.length === 2
            ? 'The other house holds.'
            : `${capital(counted(rest, 'other house', 'other houses'))} ${rest === 1 ? 'holds' : 'hold'}.`,
        ],
  );
}

function allHold(houses: readonly HouseFacts[], ofHolding: number, preferences: Preferences): Phrase[] {
  const lows = houses.flatMap((house) => house.lastLowest ?? []);
  const all =
    houses.length === 1
      ? `The ${midSentence(houses[0]?.name ?? '')} holds.`
      : houses.length === 2
        ? 'Both houses hold.'
        : `All ${houses.length} houses hold.`;
  return join(
    { text: all, tone: 'strong' },
    ofHolding === 0 ? ' No alarm stands' : ' None of them has an alarm of its own',
    lows.length === 0
      ? '.'
      : join(
          ', and the coldest came down to ',
          { text: temperature(Math.min(...lows), preferences), tone: 'house' },
          ' last night.',
        ),
  );
}

function needs(house: HouseFacts, preferences: Preferences): Phrase[] {
  const { alarms, coldest, frostLimit, lastLowest, fallingCores } = house;
  const under = (value: number | null) =>
    value !== null && frostLimit !== null && value < frostLimit ? temperature(value, preferences) : null;
  const [now, night] = [under(coldest), under(lastLowest)];
  return [
    ...(alarms === 0 ? [] : [{ text: counted(alarms, 'open alarm'), tone: 'alarm' } satisfies Phrase]),
    ...(now !== null
      ? [
          {
            text: `${now} now, under its frost limit`,
            tone: 'alarm',
          } satisfies Phrase,
        ]
      : coldest === null
        ? ['no good reading of it now']
        : []),
    ...(night !== null
      ? [
          {
            text: `${night} at its lowest last night`,
            tone: 'alarm',
          } satisfies Phrase,
        ]
      : []),
    ...fallingCores.map((name): Phrase => ({
      text: `a lasting fall of the ${midSentence(name)}’s core`,
      tone: 'core',
    })),
  ];
}

/** @example coreTrendWords(trend, USUAL) === '4.1 °C lower than 7 days before, a lasting fall' */
export function coreTrendWords(trend: CoreTrend | null, preferences: Preferences): string {
  if (trend === null) return 'under five dawns are known: no trend yet';
  const { changeK, days, isLastingFall } = trend;
  if (Math.abs(changeK) < 0.5) return `as ${days} days before`;
  const way = `${difference(Math.abs(changeK), preferences)} ${changeK < 0 ? 'lower' : 'higher'} than ${days} days before`;
  return isLastingFall ? `${way}, a lasting fall` : way;
}

/** @example agoWords(3000) === '3 s ago' is not said of what is fresh: null under a minute */
export function oldWords(at: number | null, now: number): string | null {
  if (at === null) return 'nothing read yet';
  return now - at < 60_000 ? null : `${duration((now - at) / 1000)} ago`;
}
