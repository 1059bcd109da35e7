/** Two sets of nights side by side, in words: each figure, how it differs, and whether chance alone would do that. */
import type { ComparedFigure, ComparedMean, Comparison } from '@/lib/analysis/compare';
import type { FigureKey } from '@/lib/analysis/compare-figures';
import { decimal, difference, share, temperatureFigure, degrees, UNKNOWN } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { between, join, sentences } from './join';
import type { Phrase } from './phrase';

const space = '\u00a0';

const names: Record<FigureKey, string> = {
  ran: 'Ran, of the night',
  heat: 'Heat a night',
  electricity: 'Electricity a night',
  forPower: 'Heat for 1 kWh of fan',
  core: 'Core at dawn',
  lowest: 'Lowest in the house',
  underLimit: 'Under the frost limit, a night',
  lift: 'Warmer than outdoors by',
  humid: 'Over 90\u00a0% humidity, a night',
  outdoors: 'Lowest outdoors',
};

export function figureName(key: FigureKey): string {
  return names[key];
}

/** A figure and what stands behind it, in its own unit. */
function inUnit(key: FigureKey, value: number, preferences: Preferences, isGap: boolean): string {
  switch (key) {
    case 'ran':
      return share(value, 1);
    case 'heat':
      return `${decimal(value, 2)}${space}kWh`;
    case 'electricity':
      return `${decimal(value, 3)}${space}kWh`;
    case 'forPower':
      return `${decimal(value, 0)}${space}kWh`;
    case 'underLimit':
    case 'humid':
      return `${decimal(value, 1)}${space}h`;
    case 'lift':
      return difference(value, preferences);
    default:
      return isGap
        ? difference(value, preferences)
        : `${temperatureFigure(value, preferences)}${space}${degrees(preferences)}`;
  }
}

/** @example meanWords('heat', mean, USUAL) === '4.20 ± 0.55 kWh' */
export function meanWords(key: FigureKey, mean: ComparedMean | null, preferences: Preferences): string {
  if (mean === null) return UNKNOWN;
  const value = inUnit(key, mean.mean, preferences, false);
  const [, unit = ''] = splitUnit(value);
  const [sd = ''] = splitUnit(inUnit(key, mean.sdWhole, preferences, true));
  const [figure = ''] = splitUnit(value);
  return `${figure}${space}±${space}${sd}${space}${unit}`;
}

function splitUnit(text: string): string[] {
  return text.split(space);
}

/** @example '+0.30 kWh (−0.40 to 1.00)' */
export function gapWords(
  key: FigureKey,
  gap: NonNullable<ComparedFigure['difference']>,
  preferences: Preferences,
): string {
  const of = (value: number) => inUnit(key, value, preferences, true);
  const value = of(gap.value);
  const isNothing = Number.parseFloat(value.replace('−', '-')) === 0;
  const [low = '', high = ''] = [gap.low, gap.high].map((end) => splitUnit(of(end))[0] ?? '');
  return `${gap.value > 0 && !isNothing ? '+' : ''}${value} (${low} to ${high})`;
}

const verdicts: Record<FigureKey, { more: string; less: string }> = {
  ran: { more: 'ran more', less: 'ran less' },
  heat: { more: 'gave more heat', less: 'gave less heat' },
  electricity: { more: 'took more electricity', less: 'took less electricity' },
  forPower: { more: 'gave more heat for its power', less: 'gave less heat for its power' },
  core: { more: 'had a warmer core', less: 'had a colder core' },
  lowest: { more: 'came less low', less: 'came lower' },
  underLimit: { more: 'stood longer under the frost limit', less: 'stood less long under the frost limit' },
  lift: { more: 'kept further above outdoors', less: 'kept less far above outdoors' },
  humid: { more: 'was damp for longer', less: 'was damp for less long' },
  outdoors: { more: 'had it milder outdoors', less: 'had it colder outdoors' },
};

export function verdictWords(figure: ComparedFigure): string {
  if (figure.isBeyondChance === null || figure.difference === null) return 'cannot be told yet';
  if (!figure.isBeyondChance) return 'no more than chance';
  return figure.difference.value > 0 ? 'more, beyond chance' : 'less, beyond chance';
}

/**
 * @param what the chosen, as a name in a sentence; `than` the other
 * @example "Beside the 7 nights before, the gate heap gave less heat and had a colder core, beyond chance. …"
 */
export function compareSentence(comparison: Comparison, what: string, than: string): Phrase[] {
  const { figures, chosen, other } = comparison;
  const told = figures.filter((figure) => figure.isBeyondChance !== null);
  if (told.length === 0)
    return [
      `Beside ${than}, nothing can be told yet: three whole nights of each are needed, and there are ${chosen.nights} and ${other.nights}.`,
    ];
  const clear = told.flatMap((figure): Phrase[] => {
    if (figure.isBeyondChance !== true || figure.difference === null) return [];
    return [{ text: verdicts[figure.key][figure.difference.value > 0 ? 'more' : 'less'], tone: 'strong' }];
  });
  if (clear.length === 0) return [`Beside ${than}, ${what} did nothing that chance alone would not do.`];
  return sentences(
    join(`Beside ${than}, ${what} `, ...between(clear, ', ', ' and '), ', beyond chance.'),
    clear.length < told.length ? ['What else differs is no more than chance.'] : [],
  );
}
