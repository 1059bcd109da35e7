/** The warm-hand test in words: what the probe in the hand turned out to be. */
import { WARM_RISE_K, type HandFound } from '@/lib/analysis/warm-hand';
import { difference } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';

export interface HandWords {
  tone: 'quiet' | 'good' | 'warn';
  text: string;
  /** The point whose probe is wired in place of the one that is held; null: nothing to exchange. */
  exchangeWith: string | null;
}

/**
 * @param held key of the point whose probe is in the hand
 * @param secondsSince it was taken into the hand, app time
 */
export function handWords(
  found: HandFound,
  held: string,
  nameOf: (key: string) => string,
  secondsSince: number,
  preferences: Preferences,
): HandWords {
  const rise = found.rises.find((one) => one.key === found.warmed)?.rise ?? null;
  if (found.warmed === held)
    return {
      tone: 'good',
      text: `${nameOf(held)} warmed by ${difference(rise, preferences)}: its probe is where it should be.`,
      exchangeWith: null,
    };
  if (found.warmed !== null)
    return {
      tone: 'warn',
      text: `You hold ${nameOf(held)}, yet ${nameOf(found.warmed)} warmed by ${difference(rise, preferences)}: these two are wired the wrong way round. Hold the other probe too before you exchange them.`,
      exchangeWith: found.warmed,
    };
  if (found.with.length > 0)
    return {
      tone: 'warn',
      text: `${found.with.map(nameOf).join(' and ')} warm together: their probes hang side by side, or the sun is on them. Let both cool, then hold one away from the other.`,
      exchangeWith: null,
    };
  if (secondsSince > LONG_S)
    return {
      tone: 'warn',
      text: `Nothing warmed by ${difference(WARM_RISE_K, preferences)} in ${LONG_S / 60} min. The probe in your hand sends nothing here, or it is no bare probe: look at its plug, and warm it with a cup of warm water.`,
      exchangeWith: null,
    };
  return {
    tone: 'quiet',
    text: `Hold it in the closed hand. ${difference(WARM_RISE_K, preferences)} within a minute is enough.`,
    exchangeWith: null,
  };
}

const LONG_S = 180;

export const EXCHANGE_WORDS =
  'What the node sends stays under its keys, with its range and its calibration. Names, roles and photographs change sides, and rules, sources, loops and limits go on meaning the same place: from now on they read the probe that really hangs there. What is kept of past nights then bears the name of where it was really measured, if the two were wired so from the first.';
