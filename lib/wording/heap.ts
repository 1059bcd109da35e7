/** How a heap stands, for the head of its book; and what was done to it, entry by entry. */
import { DateTime } from 'luxon';
import type { CoreTrend } from '@/lib/analysis/core';
import { sinceBuilt } from '@/lib/analysis/heap-facts';
import { ACT_C, WATCH_C } from '@/lib/analysis/heap-findings';
import { decimal, difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { join, sentences } from './join';
import type { Phrase } from './phrase';
import { midSentence } from './rule-names';

export type HeapKind = 'built' | 'fed' | 'watered' | 'turned' | 'covered' | 'note';

export interface HeapEntry {
  kind: HeapKind;
  /** ISO 8601 */
  at: string;
  materials: { material: string; kilograms?: number | undefined; litres?: number | undefined }[];
  litresOfWater: number | null;
  /** m³ */
  volume: number | null;
}

export interface HeapStanding {
  name: string;
  zone: string;
  /** Epoch ms. */
  now: number;
  core: { value: number; at: number } | null;
  coreFloor: number | null;
  trend: CoreTrend | null;
  /** Newest first. */
  entries: readonly HeapEntry[];
}

/** In the order of the buttons: what is done most often first. */
export const HEAP_KINDS: { kind: HeapKind; label: string; did: string }[] = [
  { kind: 'fed', label: 'Fed', did: 'Fed' },
  { kind: 'watered', label: 'Watered', did: 'Watered' },
  { kind: 'turned', label: 'Turned', did: 'Turned' },
  { kind: 'covered', label: 'Covered', did: 'Covered' },
  { kind: 'note', label: 'Note', did: 'Note' },
  { kind: 'built', label: 'Built', did: 'Built' },
];

export function kindWord(kind: string): string {
  return HEAP_KINDS.find((one) => one.kind === kind)?.did ?? kind;
}

const space = '\u00a0';

/**
 * @example "The gate heap is 34 days old and about 10.5 m³. Its core stands at 45.4 °C and has fallen 4.1 °C in 7 days,
 * well beyond its day-to-day wander. It was last turned on 12 November. Probe and squeeze it first; …"
 */
export function heapSentence(standing: HeapStanding, preferences: Preferences): Phrase[] {
  // what was done to the heap that stood there before is in the book, and no more than that
  const entries = sinceBuilt(standing.entries);
  const ofThis = { ...standing, entries };
  const own = midSentence(standing.name);
  const built = entries.find((entry) => entry.kind === 'built');
  return sentences(
    builtSentence(ofThis, own, built),
    coreSentence(standing, built === undefined ? `The core of the ${own}` : 'Its core', preferences),
    turnedSentence(ofThis),
    adviceSentence(ofThis, preferences),
  );
}

function builtSentence(
  { entries, zone, now }: HeapStanding,
  own: string,
  built: HeapEntry | undefined,
): Phrase[] {
  if (entries.length === 0) {
    return join(
      { text: `The book of the ${own} is empty.`, tone: 'strong' },
      ' Enter when it was built and of what; feeding, watering and turning then show beside its core.',
    );
  }
  if (built === undefined) return [`When the ${own} was built is not in its book.`];
  const days = Math.floor(dayOf(now, zone).diff(dayOf(Date.parse(built.at), zone), 'days').days);
  const age = days === 0 ? 'was built today' : `is ${days}${space}${days === 1 ? 'day' : 'days'} old`;
  const volume = entries.find((entry) => entry.volume !== null)?.volume ?? null;
  if (volume === null) return [`The ${own} ${age}.`];
  return join(
    `The ${own} ${age} and about `,
    { text: `${decimal(volume, 1)}${space}m³`, tone: 'strong' },
    '.',
  );
}

function coreSentence({ core, trend }: HeapStanding, own: string, preferences: Preferences): Phrase[] {
  if (core === null) return [`${own} has no good reading just now.`];
  const now = join(`${own} stands at `, { text: temperature(core.value, preferences), tone: 'core' });
  if (trend === null) return join(now, '.');
  const amount = difference(Math.abs(trend.changeK), preferences);
  const span = `${trend.days}${space}days`;
  if (trend.isLastingFall)
    return join(
      now,
      ' and has fallen ',
      { text: `${amount} in ${span}`, tone: 'strong' },
      ', well beyond its day-to-day wander.',
    );
  if (Math.abs(trend.changeK) < 0.5) return join(now, ` and is as it was ${span} ago.`);
  return join(now, ` and has ${trend.changeK < 0 ? 'fallen' : 'risen'} ${amount} in ${span}.`);
}

function turnedSentence({ entries, zone }: HeapStanding): Phrase[] {
  const turned = entries.find((entry) => entry.kind === 'turned');
  if (turned !== undefined) return [`It was last turned on ${longDay(Date.parse(turned.at), zone)}.`];
  return entries.some((entry) => entry.kind === 'built') ? ['It has not been turned since.'] : [];
}

function adviceSentence(
  { core, coreFloor, trend, entries }: HeapStanding,
  preferences: Preferences,
): Phrase[] {
  if (core !== null && core.value > WATCH_C) {
    const isNow = core.value > ACT_C;
    return join(
      { text: isNow ? 'It is dangerously hot:' : 'It is hot:', tone: isNow ? 'alarm' : 'warn' },
      ` over ${temperature(isNow ? ACT_C : WATCH_C, preferences, 0)} a heap dries, chars and can catch fire. Do not open it alone; wet it from outside and keep water at hand.`,
    );
  }
  if (core !== null && coreFloor !== null && core.value < coreFloor) {
    return join(
      { text: `It is under its floor of ${temperature(coreFloor, preferences)},`, tone: 'warn' },
      ' so it is not drawn on until it is warmer. Feed it greens, cover it and let it rest.',
    );
  }
  if (trend?.isLastingFall !== true) return [];
  const fed = entries.some((entry) => entry.kind === 'fed');
  return join(
    { text: 'Probe and squeeze it first;', tone: 'strong' },
    fed
      ? ' then water, feed or turn it on a mild day.'
      : ' then water it or feed it on a mild day, and turn it only if that does not help.',
  );
}

function dayOf(at: number, zone: string): DateTime {
  return DateTime.fromMillis(at, { zone, locale: 'en-GB' }).startOf('day');
}

/** @example "12 November" */
export function longDay(at: number, zone: string): string {
  return dayOf(at, zone).toFormat('d LLLL');
}

/** @example "2560 kg horse bedding, 6000 L dry leaves; 400 L water; about 10.5 m³" */
export function whatWent(entry: Pick<HeapEntry, 'materials' | 'litresOfWater' | 'volume'>): string {
  const amount = (value: number) => decimal(value, Number.isInteger(value) ? 0 : 1);
  const materials = entry.materials.map(({ material, kilograms, litres }) => {
    const amounts = [
      kilograms === undefined ? null : `${amount(kilograms)}${space}kg`,
      litres === undefined ? null : `${amount(litres)}${space}L`,
    ].filter((one) => one !== null);
    return [...amounts, midSentence(material)].join(' ');
  });
  return [
    materials.join(', '),
    entry.litresOfWater === null ? '' : `${amount(entry.litresOfWater)}${space}L water`,
    entry.volume === null ? '' : `about ${decimal(entry.volume, 1)}${space}m³`,
  ]
    .filter((part) => part !== '')
    .join('; ');
}

/** What to mind while doing it, shown where it is entered. */
export function heapCautions(kind: HeapKind | 'probed'): string[] {
  const gases =
    'Gases gather in an opened heap and over its pit: carbon dioxide, carbon monoxide, ammonia. Work upwind, never with your head in the pit, and with a certified carbon monoxide alarm in the house.';
  const hot =
    'A hot core scalds, and its steam hides where it is. Open it from the side, stand back, keep water at hand.';
  const lifting = 'Wet bedding is heavy: lift little, from the legs, or share the work.';
  const hygiene =
    'Wear gloves and wash; dust of a dry heap carries moulds, so damp it or wear a mask. Time at temperature is a record, not an approval.';
  switch (kind) {
    case 'turned':
      return [gases, hot, lifting, hygiene];
    case 'built':
      return [
        lifting,
        hygiene,
        'The fan blows into the heap’s pipe, never sucks from it, so that a leak goes outwards.',
      ];
    case 'fed':
      return [gases, hygiene];
    case 'watered':
      return [hot];
    case 'probed':
      return [
        'The probe comes out hot: wear gloves. Steam that rises along it carries gases; keep your face away from the hole, and close it behind you.',
      ];
    default:
      return [];
  }
}
