/** A channel's load and contact in words and figures. */
import { contactLoad, ratedAmps, type ContactLoad } from '@/lib/physics/contact';
import { decimal } from '@/lib/units/format';
import { join } from './join';
import type { Phrase } from './phrase';

export interface Load {
  kind: string;
  watts?: number | undefined;
  volts?: number | undefined;
  supply?: 'ac' | 'dc' | undefined;
  contactAmps?: number | undefined;
}

export { isMains } from '@/lib/physics/contact';

const space = '\u00a0';

export const LOAD_WORDS: Record<string, string> = {
  motor: 'fan or other motor',
  vent: 'vent',
  heater: 'heater',
  valve: 'valve',
  lamp: 'lamp',
  other: 'other',
};

const plainNumber = (value: number) => decimal(value, Number.isInteger(value) ? 0 : 1);

const still: Record<string, [off: string, on: string]> = {
  motor: ['stands still', 'runs'],
  vent: ['gets no current: its spring or its drive decides', 'gets current'],
  valve: ['gets no current: its spring decides', 'gets current'],
  heater: ['is cold', 'heats'],
  lamp: ['is dark', 'is lit'],
};

/**
 * What a load falls to when nothing commands it. It follows from the contact: coil off, so NO is open and NC is closed;
 * there is no other setting for it.
 * @example safeStateWords('NO', 'motor') === 'Stands still'
 */
export function safeStateWords(contact: 'NO' | 'NC', kind: string): string {
  const [off, on] = still[kind] ?? ['is off', 'is on'];
  const words = contact === 'NO' ? off : on;
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** @example circuitWords({kind: 'heater', volts: 230, supply: 'ac'}) === '230 V AC' */
export function circuitWords(load: Load): string {
  if (load.volts === undefined) return load.supply === undefined ? 'not told' : load.supply.toUpperCase();
  return `${plainNumber(load.volts)}${space}V${load.supply === undefined ? '' : ` ${load.supply.toUpperCase()}`}`;
}

/** @example ratedWords({kind: 'motor', watts: 12, volts: 24}) === '12 W · 0.50 A' */
export function ratedWords(load: Load): string {
  const amps = ratedAmps(load);
  const watts = load.watts === undefined ? null : `${plainNumber(load.watts)}${space}W`;
  if (watts === null) return 'not told';
  return amps === null ? watts : `${watts} · ${decimal(amps, 2)}${space}A`;
}

export interface ContactFit {
  isOver: boolean;
  words: Phrase[];
}

/** Whether the contact carries the load; null where a figure for it is missing. */
export function contactFit(load: Load): ContactFit | null {
  const carried = contactLoad(load);
  if (carried === null) return null;
  const { amps, isOver } = carried;
  return {
    isOver,
    words: join(
      { text: ampsWords(amps), tone: isOver ? 'alarm' : 'strong' },
      isOver ? ' is over ' : ' of ',
      bearsWords(carried),
    ),
  };
}

export const ampsWords = (amps: number): string => `${decimal(amps, 2)}${space}A`;

/** @example "1.67 A (a third of the contact’s 5 A)"; "0.67 A (a third, and of that a fifth at 48 V DC, of the contact’s 10 A)" */
function bearsWords(carried: ContactLoad): string {
  const rating = `${plainNumber(carried.rating)}${space}A`;
  const shares = [
    ...(carried.kindShare === 1 ? [] : [shareWords(carried.kindShare)]),
    ...(carried.dcShare === 1 ? [] : [`${shareWords(carried.dcShare)} for direct current`]),
  ];
  return shares.length === 0
    ? `the contact’s ${rating}`
    : `${ampsWords(carried.bears)} (${shares.join(', and of that ')} of the contact’s ${rating})`;
}

const SHARES: readonly [number, string][] = [
  [1 / 3, 'a third'],
  [1 / 5, 'a fifth'],
  [1 / 10, 'a tenth'],
  [1 / 30, 'a thirtieth'],
];
const shareWords = (share: number): string =>
  SHARES.find(([known]) => Math.abs(known - share) < 1e-9)?.[1] ?? `${decimal(share * 100, 0)}${space}%`;

export const SHARE_NOTE =
  'A contact keeps a third of its rating for motors, vents and valves, and a tenth for lamps, since starting draws many times the running current; of direct current over 30 V it keeps a fifth, over 60 V a thirtieth, since the arc does not go out by itself. This is common practice; the maker’s data sheet decides.';
