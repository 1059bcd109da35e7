/** What of a channel is its wiring: a proof is of this, and another wiring is not proved by it. */
import type { z } from 'zod';
import type { channelFields } from './channel';

type Field<Name extends keyof typeof channelFields> = z.infer<(typeof channelFields)[Name]>;

/** A channel as far as its proof hangs on it. */
export interface WiredChannel {
  node: string;
  relay: number;
  contact: Field<'contact'>;
  load: Field<'load'>;
  highLimit: Field<'highLimit'>;
  runProof: Field<'runProof'>;
  fallback: Field<'fallback'>;
  protection?: Field<'protection'> | undefined;
}

export interface Wiring {
  node: string;
  relay: number;
  contact: string;
  load: Record<string, unknown>;
  highLimit: Record<string, unknown> | null;
  runProof: Record<string, unknown> | null;
  fallback: Record<string, unknown> | null;
  contactor: boolean;
}
export type WiringPart = keyof Wiring;

export function wiringOf(channel: WiredChannel): Wiring {
  const { node, relay, contact, load, highLimit, runProof, fallback, protection } = channel;
  return {
    node,
    relay,
    contact,
    load,
    highLimit,
    runProof,
    fallback,
    contactor: protection?.contactor === true,
  };
}

/** Parts that differ, in the order of the form; none where what was proved is what is wired. */
export function changedWiring(before: Wiring, after: Wiring): WiringPart[] {
  const parts: WiringPart[] = [
    ...(['node', 'relay', 'contact', 'load', 'contactor'] as const),
    ...(['highLimit', 'runProof', 'fallback'] as const),
  ];
  return parts.filter((part) => canonical(before[part]) !== canonical(after[part]));
}

/** The same for the same, whatever the order of keys: the database keeps its own. */
function canonical(value: unknown): string {
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const entries = Object.entries(value)
    .filter(([, inner]) => inner !== undefined)
    .sort(([one], [other]) => (one < other ? -1 : 1));
  return `{${entries.map(([key, inner]) => `${key}:${canonical(inner)}`).join()}}`;
}
