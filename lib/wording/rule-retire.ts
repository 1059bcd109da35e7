/** What retiring a rule does to the load that it runs: said before it is done. */
import { midSentence } from './rule-names';

export interface RetireFacts {
  channelLabel: string;
  /** Names of the other rules in force on the channel. */
  others: readonly string[];
  isInForce: boolean;
  frostHelp: boolean;
  /** Wired to the closed contact: with the coil off the load runs. */
  runsWithoutCommand: boolean;
}

/** @example "From the next reading on nothing asks for the gate-heap fan: it stands still. Frost help and hand still work." */
export function retireWords(facts: RetireFacts): string {
  const { others, channelLabel } = facts;
  const load = `the ${midSentence(channelLabel)}`;
  if (!facts.isInForce) return 'It is not in force, so no load is touched. Its draft ends with it.';
  const last = others.at(-1);
  if (last !== undefined) {
    const names = others.length === 1 ? last : `${others.slice(0, -1).join(', ')} and ${last}`;
    return `From the next reading on ${load} goes by ${others.length === 1 ? 'its other rule' : 'its other rules'}, ${names}.`;
  }
  // a rule's "off" and no rule are one: the load is commanded off either way
  const falls = facts.runsWithoutCommand
    ? 'it is held off, and runs when the node is not commanded'
    : 'it stands still';
  const still = facts.frostHelp ? 'Frost help and hand still work.' : 'It can still be run by hand.';
  return `From the next reading on nothing asks for ${load}: ${falls}. ${still}`;
}
