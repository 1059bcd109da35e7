/** A channel's load and contact in words and figures. */
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

/** A: what the load draws when it runs; null where watts or volts are not told. */
export function ratedAmps(load: Load): number | null {
  return load.watts === undefined || load.volts === undefined || load.volts <= 0
    ? null
    : load.watts / load.volts;
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

/** Above this a circuit is mains for the caution: extra-low voltage ends at 50 V AC and 120 V DC (IEC 61140). */
export function isMains(load: Load): boolean {
  return load.volts !== undefined && load.volts > (load.supply === 'dc' ? 120 : 50);
}

/**
 * Share of a contact's resistive rating that common practice leaves for a load: the start of a motor draws five to eight
 * times its running current, that of a filament lamp ten to fifteen times.
 */
export function usualShare(kind: string): number {
  if (kind === 'motor' || kind === 'vent' || kind === 'valve') return 1 / 3;
  return kind === 'lamp' ? 1 / 10 : 1;
}

export interface ContactFit {
  isOver: boolean;
  words: Phrase[];
}

/** Whether the contact carries the load; null where a figure for it is missing. */
export function contactFit(load: Load): ContactFit | null {
  const amps = ratedAmps(load);
  if (amps === null || load.contactAmps === undefined) return null;
  const share = usualShare(load.kind);
  const bears = load.contactAmps * share;
  const isOver = amps > bears;
  const a = (value: number) => `${decimal(value, 2)}${space}A`;
  const rating = `${plainNumber(load.contactAmps)}${space}A`;
  const left =
    share === 1 ? `the contact’s ${rating}` : `${a(bears)} (${shareWords(share)} of the contact’s ${rating})`;
  return {
    isOver,
    words: join({ text: a(amps), tone: isOver ? 'alarm' : 'strong' }, isOver ? ' is over ' : ' of ', left),
  };
}

const shareWords = (share: number) => (share < 0.2 ? 'a tenth' : 'a third');

export const SHARE_NOTE =
  'A contact keeps a third of its rating for motors, vents and valves, and a tenth for lamps, since starting draws many times the running current. This is common practice; the maker’s data sheet decides.';
