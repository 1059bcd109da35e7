/** The yard drawing in words, for whoever does not see it. */
import { humidity, power, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import type { YardFacts, YardLoop } from './yard-facts';

/** @example loopWords(loop, preferences) === 'loop at rest' */
export function loopWords(loop: YardLoop | null, preferences: Preferences): string {
  if (loop === null) return 'no loop is entered';
  if (loop.isOrdered) return 'loop ordered on, not yet reported';
  if (!loop.runs) return 'loop at rest';
  if (loop.heatW === null) return 'air moves; its heat is not known';
  const ends = `${temperature(loop.intake, preferences)} to ${temperature(loop.back, preferences)}`;
  return `${loop.heatW < 0 ? 'takes' : 'brings'} ${power(Math.abs(loop.heatW))}, ${ends}`;
}

export function yardWords(facts: YardFacts, preferences: Preferences): string {
  const degrees = (value: number | null) => temperature(value, preferences);
  return [
    `House ${degrees(facts.house)}${facts.humidity === null ? '' : `, ${humidity(facts.humidity)}`}.`,
    `Outdoors ${degrees(facts.outdoors)}.`,
    facts.heap === null
      ? ''
      : `${facts.heap.name}: core ${degrees(facts.heap.core)}, beside the pipe ${degrees(facts.heap.base)}; ${loopWords(facts.heap.loop, preferences)}.`,
    facts.ground === null
      ? ''
      : `${facts.ground.name}: ground ${degrees(facts.ground.temperature)}; ${loopWords(facts.ground.loop, preferences)}.`,
    facts.heater === null ? '' : `${facts.heater.label} ${facts.heater.on ? 'on' : 'off'}.`,
    facts.vent === null ? '' : `${facts.vent.label} ${facts.vent.open ? 'open' : 'shut'}.`,
    facts.more.length === 0 ? '' : `Not drawn: ${facts.more.join(', ')}.`,
  ]
    .filter(Boolean)
    .join(' ');
}
