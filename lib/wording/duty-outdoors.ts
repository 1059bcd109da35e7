/** What the scatter of heat against the cold outdoors says. */
import type { HeatLine, HeatNight, NoLine } from '@/lib/analysis/heat-outdoors';
import { decimal, degrees } from '@/lib/units/format';
import { fahrenheitDifference } from '@/lib/units/conversion';
import type { Preferences } from '@/lib/units/preferences';

const space = '\u00a0';

const why: Record<NoLine, string> = {
  'few-nights': 'under eight whole nights with a draw are known',
  'like-nights': 'all nights were about as cold as each other',
};

/** @example "Each °C colder outdoors goes with 0.31 kWh (0.22 to 0.40) more a night from the gate heap, over 34 nights; …" */
export function outdoorsWords(
  line: HeatLine | { why: NoLine },
  nights: readonly HeatNight[],
  source: string,
  preferences: Preferences,
): string {
  if ('why' in line)
    return `How much more heat a colder night brings is not known yet: ${why[line.why]}${nights.length === 0 ? '' : ` (${nights.length} so far)`}.`;
  const { value, low, high } = line.perColderK;
  // a degree of Fahrenheit is the smaller step
  const perDegree = (kWh: number) =>
    decimal(kWh / (preferences.temperature === 'F' ? fahrenheitDifference(1) : 1), 2);
  const interval = `${perDegree(value)}${space}kWh (${perDegree(low)} to ${perDegree(high)})`;
  if (low <= 0 && high >= 0)
    return `Over ${nights.length} nights, no heat that goes with the cold outdoors can be told from chance: ${interval} for each ${degrees(preferences)} colder.`;
  return `Each ${degrees(preferences)} colder outdoors goes with ${interval} ${value > 0 ? 'more' : 'less'} a night from the ${source}, over ${nights.length} nights; single nights scatter by ${decimal(line.scatterKWh, 1)}${space}kWh.`;
}
