/** The printed wiring sheet in words: what protects a circuit, and what to do at the panel while no software answers. */
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { protectionWords, type Protection } from './protection';
import { exactly } from './settings';

export const NOT_RECORDED = 'not recorded';

/** As on the screen, with the date of the residual-current device's test, for which a sheet on a door is read. */
export function protectionOnPaper(protection: Protection | null): string {
  if (protection === null) return NOT_RECORDED;
  const { rcdMilliamps, rcdTestedOn } = protection;
  const told = protectionWords(protection);
  if (rcdMilliamps === undefined) return told;
  return `${told}, ${rcdTestedOn === undefined ? 'test not recorded' : `tested ${rcdTestedOn}`}`;
}

export interface SheetLoad {
  number: number;
  label: string;
  contact: 'NO' | 'NC';
  kind: string;
  /** It blows air through a heap or the ground. */
  isDraw: boolean;
  /** Of its rule in force; null where it has none or no rest. */
  rest: { longestDrawS: number; leastS: number } | null;
}

/**
 * How to run the fan without software, step by step. It leads nobody to a live terminal: what is run by hand is run by a
 * switch that a qualified person fitted beforehand, and local code decides over all of it.
 */
export function withoutSoftware(
  loads: readonly SheetLoad[],
  lastResort: { below: number; provedOn: string | null } | null,
  preferences: Preferences,
): string[] {
  const named = (some: readonly SheetLoad[]) => some.map((one) => `${one.number} ${one.label}`).join(', ');
  const nc = loads.filter((one) => one.contact === 'NC');
  const draws = loads.filter((one) => one.isDraw);
  const heaters = loads.filter((one) => one.kind === 'heater');
  return [
    lastResort === null
      ? 'First look at the crop’s own guard: no thermostat of last resort is recorded here. Until one is fitted, nothing warms this house while the panel is dead.'
      : `First look at the thermostat of last resort: it switches its heater under ${temperature(lastResort.below, preferences)} without any software${lastResort.provedOn === null ? ', but nobody has seen it work yet' : `, and was seen to on ${lastResort.provedOn}`}.`,
    'To stop any load at once, open its isolator. The software’s lock-out, hand and off do not isolate.',
    nc.length === 0
      ? 'With the relay board dead, every load here stands still: all are on NO contacts.'
      : `With the relay board dead, these run, being on NC contacts: ${named(nc)}. Only their isolators stop them. All others stand still.`,
    draws.length === 0
      ? 'A load is run by hand only by a hand switch that a qualified person has fitted across its NO contact, in the same enclosure, behind the same isolator, fuse and residual-current protection. Never put a wire or a tool across a contact.'
      : `A fan is run by hand only by a hand switch that a qualified person has fitted across its NO contact, in the same enclosure, behind the same isolator, fuse and residual-current protection: ${named(draws)}. Is there none, leave the panel shut and call one. Never put a wire or a tool across a contact.`,
    ...draws.map(restWords),
    ...(heaters.length === 0
      ? []
      : [
          `Never bridge a heater or its high limit: ${named(heaters)}. Use a heater that has a thermostat and a cut-out of its own.`,
        ]),
    'A hand switch passes by every limit of the software: rest, floor of the core, high limit, longest run. Stay with the load, and go by the clock and a thermometer.',
    'The fan blows into the heap’s pipe and never sucks from it. Smell or warm air from the heap in the house: stop, open up, go out.',
    'Turn every hand switch back when you leave, and write in the heap book what ran from when to when.',
  ];
}

function restWords(load: SheetLoad): string {
  return load.rest === null
    ? `${load.number} ${load.label}: no rest is set by a rule in force. Run it shortly, and leave the source alone at least as long again.`
    : `${load.number} ${load.label}: at most ${exactly(load.rest.longestDrawS)} at a time, then off for at least ${exactly(load.rest.leastS)}, as its rule has it.`;
}

export const LOCAL_CODE =
  'Work on mains belongs to a licensed electrician under your local code, which goes before everything on this sheet.';
