/** What stands under the mix, and what the calculator answers. */
import { ORGANIC_CN } from '@/lib/analysis/hygiene';
import { addForMoisture, WATER, type Advice, type Goals, type Mix } from '@/lib/analysis/mix';
import type { HeapMix } from '@/lib/analysis/material-book';
import { decimal, share } from '@/lib/units/format';
import { between } from './join';
import { plainText } from './phrase';

const space = '\u00a0';
/** Share of water at which a heap works best; Cornell: 50 to 60 %. */
export const GOAL_MOISTURE = 0.55;
export const GOAL_CN = 30;

const cnWords = (cn: number) => `${decimal(cn, 0)}${space}:${space}1`;

/** kg under 10 with a decimal, above in whole ones. */
export function kilograms(mass: number): string {
  return `${decimal(mass, mass < 10 ? 1 : 0)}${space}kg`;
}

export function mixNotes({ mix, sd, left, parts }: HeapMix): string[] {
  const { cn, moisture } = mix;
  const notes: string[] = [];
  if (cn !== null && moisture !== null)
    notes.push(
      `On the mass of carbon, nitrogen and water: ${cnWords(cn)} ± ${decimal(sd.cn ?? 0, 0)}, ${share(moisture)} ± ${share(sd.moisture)} water. So it went in; a heap loses carbon and water from its first day.`,
    );
  const toGoal = addForMoisture(mix, GOAL_MOISTURE, WATER);
  if (toGoal.kind === 'add' && toGoal.massKg >= 1)
    notes.push(
      `To come to ${share(GOAL_MOISTURE)} water it would have needed ${decimal(toGoal.massKg, 0)}${space}L more.`,
    );
  if (cn !== null && (cn < ORGANIC_CN.least || cn > ORGANIC_CN.most))
    notes.push(
      `Outside the ${ORGANIC_CN.least} to ${ORGANIC_CN.most}${space}:${space}1 that the organic rule asks of a beginning (7 CFR 205.203).${cn > ORGANIC_CN.most ? ' Wood counts with all of its carbon, of which little is reached in a winter.' : ''}`,
    );
  if (left.length > 0)
    notes.push(
      `Left out: ${listOf(left)}, of which amount or figures are not known. Enter it as a material of your own.`,
    );
  const sources = new Set(parts.map((part) => part.known?.source));
  if (sources.has('table') || sources.has('memory'))
    notes.push(
      `Figures of ${sources.has('own') ? 'the other materials' : 'the materials'} are typical ones of published tables; weigh and dry your own where it matters.`,
    );
  return notes;
}

function listOf(names: readonly string[]): string {
  return plainText(between([...names], ', ', ' and '));
}

/** The calculator's answer about one material to add: sentences. */
export function adviceWords(mix: Mix, goals: Goals, adding: string, advice: Advice): string[] {
  const { forMoisture, forCn, cnAtMoisture, moistureAtCn, both } = advice;
  if (mix.cn === null || mix.moisture === null) return ['Give at least one material with its amount.'];
  const water =
    forMoisture.kind === 'there'
      ? `The water is right already: ${share(mix.moisture)}.`
      : forMoisture.kind === 'cannot'
        ? `No amount of ${adding} brings the water to ${share(goals.moisture)}: it lies on the same side as the mix.`
        : `For ${share(goals.moisture)} water: add ${kilograms(forMoisture.massKg)} of ${adding}; C:N is then ${cnWords(cnAtMoisture ?? 0)}.`;
  const carbon =
    forCn.kind === 'there'
      ? `C:N is right already: ${cnWords(mix.cn)}.`
      : forCn.kind === 'cannot'
        ? `No amount of ${adding} brings C:N to ${cnWords(goals.cn)}: it lies on the same side as the mix.`
        : `For ${cnWords(goals.cn)}: add ${kilograms(forCn.massKg)} of ${adding}; water is then ${share(moistureAtCn)}.`;
  return [water, carbon, bothWords(goals, adding, both)];
}

function bothWords(goals: Goals, adding: string, both: Advice['both']): string {
  if (both === null)
    return `Both at once cannot be met with ${adding} and water: look for a material that is drier or wetter, or of other C:N, or settle for one of the two.`;
  const parts = [
    both.massKg > 0 ? `${kilograms(both.massKg)} of ${adding}` : null,
    both.waterL >= 0.5 ? `${decimal(both.waterL, 0)}${space}L of water` : null,
  ].filter((part) => part !== null);
  if (parts.length === 0) return 'Both are met as it is.';
  return `For both at once: ${parts.join(' and ')} give ${cnWords(goals.cn)} and ${share(goals.moisture)} water.`;
}
