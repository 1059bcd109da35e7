/** Shapes and order of interlocks; what they decide is in claims/interlock.ts. */

export interface PlanInterlock {
  kind: 'never-with' | 'needs';
  channel: number;
  other: number;
  delayMs: number;
  frostMayBreak: boolean;
}

/** What interlocks say of one channel at an instant. */
export interface InterlockVerdict {
  wants: 'on' | 'off';
  kind: 'never-with' | 'needs' | 'holds';
  other: number;
  delayMs: number;
  /** When the delay is over, once it runs. */
  until: number | null;
  /** Frost wants this channel on and the interlock does not let it. */
  blocksFrost: boolean;
}

/**
 * Channels in an order in which a needed one comes before those that need it. A cycle (refused at save) would leave
 * its channels in their own order at the end.
 */
export function needsOrder(channels: number, interlocks: readonly PlanInterlock[]): number[] {
  const order: number[] = [];
  const placed = new Set<number>();
  const needs = interlocks.filter((lock) => lock.kind === 'needs');
  for (let more = true; more;) {
    more = false;
    for (let one = 0; one < channels; one += 1) {
      if (placed.has(one)) continue;
      if (needs.some((lock) => lock.channel === one && !placed.has(lock.other))) continue;
      placed.add(one);
      order.push(one);
      more = true;
    }
  }
  for (let one = 0; one < channels; one += 1) if (!placed.has(one)) order.push(one);
  return order;
}

/** Keys of channels that need each other in a ring, one ring at a time; empty: none. */
export function needsCycle(needs: readonly { channel: string; other: string }[]): string[] {
  const next = new Map<string, string[]>();
  for (const { channel, other } of needs) next.set(channel, [...(next.get(channel) ?? []), other]);
  const done = new Set<string>();
  const walk = (key: string, path: string[]): string[] => {
    if (path.includes(key)) return path.slice(path.indexOf(key));
    if (done.has(key)) return [];
    for (const other of next.get(key) ?? []) {
      const ring = walk(other, [...path, key]);
      if (ring.length > 0) return ring;
    }
    done.add(key);
    return [];
  };
  for (const key of next.keys()) {
    const ring = walk(key, []);
    if (ring.length > 0) return ring;
  }
  return [];
}
