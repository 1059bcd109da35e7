/**
 * What a relay's contact carries: one table for the checks of a rule, the words on Wiring, the form and the proving.
 *
 * A contact's rating is for a resistive load on alternating current. What other loads leave of it is common practice, no
 * source: the start of a motor draws five to eight times its running current, that of a filament lamp ten to fifteen
 * times; and direct current has no zero at which an arc goes out, so above some 30 V a contact breaks far less of it.
 * The maker's data sheet decides.
 */

export interface LoadOnContact {
  kind: string;
  watts?: number | null | undefined;
  volts?: number | null | undefined;
  supply?: 'ac' | 'dc' | null | undefined;
  /** Rating of what switches the load, A: the contactor's where there is one, else the relay's. */
  contactAmps?: number | null | undefined;
}

const SHARE_OF_KIND: Readonly<Record<string, number>> = {
  motor: 1 / 3,
  vent: 1 / 3,
  valve: 1 / 3,
  lamp: 1 / 10,
};

/** Of a contact rated for AC, by the voltage that it breaks, DC. */
const SHARE_OF_DC: readonly { upToV: number; share: number }[] = [
  { upToV: 30, share: 1 },
  { upToV: 60, share: 1 / 5 },
  { upToV: Infinity, share: 1 / 30 },
];

/** Share of its rating that is left for a kind of load: 1 for heaters and whatever is resistive. */
export const kindShare = (kind: string): number => SHARE_OF_KIND[kind] ?? 1;

/** Share that is left for direct current; 1 for alternating current, and where it is not told. */
export function dcShare({ supply, volts }: LoadOnContact): number {
  if (supply !== 'dc' || typeof volts !== 'number') return 1;
  return SHARE_OF_DC.find(({ upToV }) => volts <= upToV)?.share ?? 1;
}

/** A: what the load draws when it runs; null where watts or volts are not told. */
export function ratedAmps({ watts, volts }: LoadOnContact): number | null {
  return typeof watts !== 'number' || typeof volts !== 'number' || volts <= 0 ? null : watts / volts;
}

export interface ContactLoad {
  /** What the load draws, A. */
  amps: number;
  /** The contact's rating, A, and what is left of it for this load. */
  rating: number;
  bears: number;
  kindShare: number;
  dcShare: number;
  isOver: boolean;
}

/**
 * Whether the contact carries the load; null where a figure for it is missing.
 * @example contactLoad({ kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 }) is 0.5 A of 5 A ÷ 3 = 1.67 A
 */
export function contactLoad(load: LoadOnContact): ContactLoad | null {
  const amps = ratedAmps(load);
  if (amps === null || typeof load.contactAmps !== 'number' || load.contactAmps <= 0) return null;
  const shares = { kindShare: kindShare(load.kind), dcShare: dcShare(load) };
  const bears = load.contactAmps * shares.kindShare * shares.dcShare;
  return { amps, rating: load.contactAmps, bears, ...shares, isOver: amps > bears };
}

/** Above this a circuit is not extra-low voltage any more: 50 V AC, 120 V DC (IEC 61140, from memory). */
export function isMains({ volts, supply }: LoadOnContact): boolean {
  return typeof volts === 'number' && volts > (supply === 'dc' ? 120 : 50);
}
