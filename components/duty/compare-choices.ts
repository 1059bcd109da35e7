/** What Duty's nights can be compared with, and how either side is called. */
import { nightDate } from '@/lib/wording/duty';
import { midSentence } from '@/lib/wording/rule-names';
import type { DutyAddress } from './address';
import { againstText, readAgainst } from './against';

export interface DutyPlace {
  slug: string;
  name: string;
  sources: { slug: string; name: string }[];
}

interface Shown {
  house: { slug: string };
  source: { slug: string; name: string };
  address: DutyAddress;
  /** Names of the chosen nights, ascending. */
  chosen: readonly string[];
  /** Of all nights that may be chosen. */
  all: readonly string[];
  places: readonly DutyPlace[];
}

export interface ChoiceGroup {
  group: string;
  choices: { value: string; label: string }[];
}

export function compareChoices(shown: Shown): ChoiceGroup[] {
  const { house, source, address, places, chosen } = shown;
  const kept = address.against === undefined ? null : readAgainst(address.against);
  const own = kept?.kind === 'nights' ? (address.against ?? '') : othersFrom(shown);
  const sources = places.flatMap((place) =>
    place.sources
      .filter(({ slug }) => place.slug !== house.slug || slug !== source.slug)
      .map(({ slug, name }) => ({
        value: againstText({ kind: 'source', house: place.slug, source: slug }),
        label: place.slug === house.slug ? name : `${name}, ${place.name}`,
      })),
  );
  const houses = places
    .filter(({ slug }) => slug !== house.slug)
    .map(({ slug, name }) => ({ value: againstText({ kind: 'house', house: slug }), label: name }));
  return [
    {
      group: 'Other nights',
      choices: [
        {
          value: 'before',
          label: chosen.length === 1 ? 'The night before' : `The ${chosen.length} nights before`,
        },
        ...(own === null ? [] : [{ value: own, label: 'Nights that I choose' }]),
      ],
    },
    { group: 'The same nights of another source', choices: sources },
    { group: 'The same nights of another house', choices: houses },
  ].filter(({ choices }) => choices.length > 0);
}

/** Where a second brush begins: over the first third of what is shown. */
function othersFrom({ all }: Shown): string | null {
  const [from, to] = [all[0], all[Math.max(0, Math.ceil(all.length / 3) - 1)]];
  return from === undefined || to === undefined || all.length < 2
    ? null
    : againstText({ kind: 'nights', from, to });
}

/** @example nightsWords(['2026-11-03', '2026-11-09']) === 'the nights of 3 to 9 Nov' */
export function nightsWords(nights: readonly { night: string }[]): string {
  const [first, last] = [nights[0]?.night, nights.at(-1)?.night];
  if (first === undefined || last === undefined) return 'no nights';
  if (first === last) return `the night of ${nightDate(first)}`;
  const begin = first.slice(0, 7) === last.slice(0, 7) ? String(Number(first.slice(8))) : nightDate(first);
  return `the nights of ${begin} to ${nightDate(last)}`;
}

interface Names {
  what: string;
  than: string;
  heads: { chosen: string; other: string };
}

type OtherFacts =
  | { kind: 'ranges'; nights: readonly { night: string }[] }
  | { kind: 'source' | 'house'; name: string; house?: string | null };

/** How the two sides are called in the sentence and over the columns. */
export function compareNames(
  house: { name: string },
  source: { name: string },
  chosen: readonly { night: string }[],
  other: OtherFacts,
): Names {
  const range = (nights: readonly { night: string }[]) => nightsWords(nights).replace(/^the nights? of /, '');
  switch (other.kind) {
    case 'ranges':
      return {
        what: `the ${midSentence(source.name)} in ${nightsWords(chosen)}`,
        than: nightsWords(other.nights),
        heads: { chosen: range(chosen), other: range(other.nights) },
      };
    case 'source':
      return {
        what: `the ${midSentence(source.name)}`,
        than: `the ${midSentence(other.name)}${typeof other.house === 'string' ? ` of the ${midSentence(other.house)}` : ''}`,
        heads: { chosen: source.name, other: other.name },
      };
    case 'house':
      return {
        what: `the ${midSentence(house.name)}`,
        than: `the ${midSentence(other.name)}`,
        heads: { chosen: house.name, other: other.name },
      };
  }
}
