/** What was refused of a node's readings, as its row keeps it for whoever wires it. Pure. */
import type { BootId, RefusedRecord } from '@/lib/field/frames';

/** As kept in `node.status`. Counted since the node's boot; one that only posts has none, and is counted all through. */
export interface Refusals {
  refused: number;
  refusedOfBoot: BootId | null;
  /** The newest first, each reason of a name once. */
  refusals: { at: number; name: string; why: string }[];
}

const KEPT = 5;
const NAME_MAX = 60;

type Status = Readonly<Record<string, unknown>>;

/** The count begins anew with a boot; a connection that was lost and found again goes on counting. */
export function refusalsOfBoot(status: Status, boot: BootId): Refusals {
  return status['refusedOfBoot'] === boot ? kept(status) : { refused: 0, refusedOfBoot: boot, refusals: [] };
}

/** @param at epoch milliseconds of app time */
export function withRefused(status: Status, refused: readonly RefusedRecord[], at: number): Refusals {
  const before = kept(status);
  const fresh = refused.map(({ name, why }) => ({ at, name: name.slice(0, NAME_MAX), why })).reverse();
  const seen = new Set<string>();
  const refusals = [...fresh, ...before.refusals].filter(({ name, why }) => {
    const mark = `${name} ${why}`;
    return !seen.has(mark) && seen.add(mark);
  });
  return { ...before, refused: before.refused + refused.length, refusals: refusals.slice(0, KEPT) };
}

/** From a row that an older worker may have written. */
function kept(status: Status): Refusals {
  const { refused, refusedOfBoot: boot, refusals } = status;
  return {
    refused: typeof refused === 'number' ? refused : 0,
    refusedOfBoot: typeof boot === 'string' || typeof boot === 'number' ? boot : null,
    refusals: Array.isArray(refusals) ? refusals.filter(isRefusal) : [],
  };
}

function isRefusal(value: unknown): value is Refusals['refusals'][number] {
  if (typeof value !== 'object' || value === null) return false;
  const { at, name, why } = value as Record<string, unknown>;
  return typeof at === 'number' && typeof name === 'string' && typeof why === 'string';
}
