/** What the worker's link keeps of a node, read with care: an older worker may have kept less. */
export interface NodeStatus {
  firmware: string | null;
  boot: string | null;
  /** Its clock minus ours, s; null: it has none, or has not said. */
  clockErrorS: number | null;
  trips: number | null;
  refused: number | null;
}

const text = (value: unknown) => (typeof value === 'string' && value !== '' ? value : null);
const number = (value: unknown) => (typeof value === 'number' && Number.isFinite(value) ? value : null);

export function nodeStatus(kept: Record<string, unknown> | undefined): NodeStatus {
  return {
    firmware: text(kept?.firmware),
    boot: text(kept?.boot),
    clockErrorS: number(kept?.clockErrorS),
    trips: number(kept?.trips),
    refused: number(kept?.refused),
  };
}
