/** What a node's row keeps of what it told, for whoever wires it: its starts, how much it measures, names without a point. Pure. */
import type { BootId, RefusedRecord } from '@/lib/field/frames';

type Status = Readonly<Record<string, unknown>>;

/** As kept in `node.status`. */
export interface Starts {
  /** Starts after the first that was seen. */
  restarts: number;
  /** When the boot of now was first heard of, epoch ms. */
  bootAt: number | null;
}

/** @param at epoch ms of app time, of the hello */
export function startsOf(status: Status, boot: BootId, at: number): Starts {
  const { boot: before, restarts, bootAt } = status;
  const count = typeof restarts === 'number' ? restarts : 0;
  if (before === boot) return { restarts: count, bootAt: typeof bootAt === 'number' ? bootAt : null };
  const isKnown = typeof before === 'string' || typeof before === 'number';
  return { restarts: isKnown ? count + 1 : count, bootAt: at };
}

export interface UnknownName {
  name: string;
  /** As sent; null where it came without. */
  unit: string | null;
  /** When it was last sent, epoch ms. */
  at: number;
}

const UNKNOWN_MOST = 40;
const NAME_MOST = 60;
const UNIT_MOST = 12;
/** A sensor that was taken off is forgotten after a day. */
const FORGOTTEN_MS = 86_400_000;
/** As lib/field/pack.ts says it. */
const NO_POINT = 'this node has no point of that name';

/** Names that a node sends and that are no point of it, the newest first. */
export function withUnknown(
  status: Status,
  refused: readonly RefusedRecord[],
  pack: readonly unknown[],
  at: number,
): { unknown: UnknownName[] } {
  const fresh = refused
    .filter(({ why, name }) => why === NO_POINT && name !== '' && name.length <= NAME_MOST)
    .map(({ name, index }) => ({ name, unit: unitOf(pack, index), at }));
  const names = new Set(fresh.map(({ name }) => name));
  const before = kept(status).filter((one) => !names.has(one.name) && one.at > at - FORGOTTEN_MS);
  return {
    unknown: [...new Map(fresh.map((one) => [one.name, one])).values(), ...before].slice(0, UNKNOWN_MOST),
  };
}

/** The unit of a record as sent, its pack's base unit where it has none (RFC 8428, 4.6). */
function unitOf(pack: readonly unknown[], index: number): string | null {
  const field = (at: number, name: string): unknown => {
    const record = pack[at];
    return typeof record === 'object' && record !== null
      ? (record as Record<string, unknown>)[name]
      : undefined;
  };
  const own = field(index, 'u');
  if (typeof own === 'string') return own.slice(0, UNIT_MOST);
  for (let at = index; at >= 0; at -= 1) {
    const base = field(at, 'bu');
    if (typeof base === 'string') return base.slice(0, UNIT_MOST);
  }
  return null;
}

function kept(status: Status): UnknownName[] {
  const { unknown } = status;
  return (Array.isArray(unknown) ? unknown : []).flatMap((one: unknown): UnknownName[] => {
    if (typeof one !== 'object' || one === null) return [];
    const { name, unit, at } = one as Record<string, unknown>;
    if (typeof name !== 'string' || typeof at !== 'number') return [];
    return [{ name, unit: typeof unit === 'string' ? unit : null, at }];
  });
}

const RATE_OVER_MS = 5 * 60_000;

/** How many readings a minute a node sends, counted over the last five minutes. */
export class ReadingRate {
  private packs: { at: number; count: number }[] = [];

  constructor(private readonly startedAt: number) {}

  add(count: number, at: number): void {
    this.packs = [...this.packs.filter((one) => one.at > at - RATE_OVER_MS), { at, count }];
  }

  /** Null in the first minute: nothing is known yet. */
  perMinute(now: number): number | null {
    const overMs = Math.min(RATE_OVER_MS, now - this.startedAt);
    if (overMs < 60_000) return null;
    const sum = this.packs
      .filter((one) => one.at > now - overMs)
      .reduce((total, { count }) => total + count, 0);
    return Math.round((sum / overMs) * 600_000) / 10;
  }
}
