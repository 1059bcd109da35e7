import type { CanFallback } from '@/lib/wording/alone';

/** What the worker's link keeps of a node, read with care: an older worker may have kept less. */
export interface NodeStatus {
  firmware: string | null;
  boot: string | null;
  /** Its clock minus ours, s; null: it has none, or has not said. */
  clockErrorS: number | null;
  trips: number | null;
  refused: number | null;
  /** Whether it can run fallbacks, as its hello said. */
  canFallback: CanFallback;
  /** Why, the newest first. */
  refusals: { name: string; why: string }[];
  /** Starts since it was first heard. */
  restarts: number | null;
  /** Taken, over the last minutes; null while nothing is known yet. */
  readingsAMinute: number | null;
  /** Relays that the node itself says it has. */
  relaysTold: number | null;
  /** Names it sends that are no point of it, with the unit they come in. */
  unknown: { name: string; unit: string | null }[];
}

const text = (value: unknown) => (typeof value === 'string' && value !== '' ? value : null);
/** A node may draw an id for each boot or count them. */
const bootText = (value: unknown) => (typeof value === 'number' ? String(value) : text(value));
const number = (value: unknown) => (typeof value === 'number' && Number.isFinite(value) ? value : null);

export function nodeStatus(kept: Record<string, unknown> | undefined): NodeStatus {
  return {
    firmware: text(kept?.firmware),
    boot: bootText(kept?.boot),
    clockErrorS: number(kept?.clockErrorS),
    trips: number(kept?.trips),
    refused: number(kept?.refused),
    canFallback: !Array.isArray(kept?.can) ? 'not-told' : kept.can.includes('fallback') ? 'can' : 'cannot',
    refusals: (Array.isArray(kept?.refusals) ? kept.refusals : []).flatMap(refusal),
    restarts: number(kept?.restarts),
    readingsAMinute: number(kept?.readingsAMinute),
    relaysTold: number(kept?.channels),
    unknown: (Array.isArray(kept?.unknown) ? kept.unknown : []).flatMap(unknownName),
  };
}

/** Why a board or a broker that is gone to cannot be reached; null: it can, or the node calls by itself. */
export function linkTrouble(kept: Record<string, unknown> | undefined): string | null {
  return text(kept?.linkTrouble);
}

function refusal(value: unknown): NodeStatus['refusals'] {
  if (typeof value !== 'object' || value === null) return [];
  const { name, why } = value as Record<string, unknown>;
  return typeof name === 'string' && typeof why === 'string' ? [{ name, why }] : [];
}

function unknownName(value: unknown): NodeStatus['unknown'] {
  if (typeof value !== 'object' || value === null) return [];
  const { name, unit } = value as Record<string, unknown>;
  return typeof name === 'string' ? [{ name, unit: text(unit) }] : [];
}

/** Whether each node can run fallbacks, by its key. */
export function canFallback(
  nodes: readonly { id: string; key: string; kind: string }[],
  kept: Record<string, Record<string, unknown>>,
): Record<string, CanFallback> {
  return Object.fromEntries(
    nodes.map(({ id, key, kind }) => {
      // a board on a bus, or a node that only posts, keeps nothing of ours
      const can = kind === 'socket' || kind === 'mqtt' ? nodeStatus(kept[id]).canFallback : 'cannot';
      return [key, can];
    }),
  );
}
