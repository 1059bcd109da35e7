/** Where the drawing of interlocks puts things: channels in a column, each interlock an arc at its right. */

export interface Lock {
  channel: string;
  kind: 'never-with' | 'needs';
  other: string;
  isDraft?: boolean;
}

export interface Arc extends Lock {
  /** SVG path from the channel to the other. */
  path: string;
  /** Middle of the arc, where its sign stands. */
  middle: { x: number; y: number };
  /** Row of the other, where the arrow of a need ends. */
  end: { x: number; y: number };
}

export interface InterlockLayout {
  rows: { key: string; y: number }[];
  arcs: Arc[];
  width: number;
  height: number;
}

const [ROW, TOP, LEFT, DEEPEST, STEP] = [34, 20, 232, 104, 24];

/** Arcs that span more rows bulge further; of two over the same rows the second bulges further still. */
export function interlockLayout(keys: readonly string[], locks: readonly Lock[]): InterlockLayout {
  const rows = keys.map((key, place) => ({ key, y: TOP + place * ROW }));
  const rowOf = new Map(rows.map((row) => [row.key, row]));
  const spans = new Map<string, number>();
  const arcs = locks.flatMap((lock): Arc[] => {
    const [from, to] = [rowOf.get(lock.channel), rowOf.get(lock.other)];
    if (from === undefined || to === undefined || from === to) return [];
    const [low, high] = [Math.min(from.y, to.y), Math.max(from.y, to.y)];
    const span = `${low} ${high}`;
    const before = spans.get(span) ?? 0;
    spans.set(span, before + 1);
    const depth = Math.min(DEEPEST, ((high - low) / ROW) * STEP + before * 18 + 8);
    const x = LEFT + depth;
    return [
      {
        ...lock,
        path: `M${LEFT} ${from.y}C${x} ${from.y} ${x} ${to.y} ${LEFT} ${to.y}`,
        // a cubic's middle lies three quarters of the way to its two controls
        middle: { x: LEFT + depth * 0.75, y: (from.y + to.y) / 2 },
        end: { x: LEFT, y: to.y },
      },
    ];
  });
  return { rows, arcs, width: LEFT + DEEPEST + 8, height: TOP * 2 + Math.max(0, keys.length - 1) * ROW };
}
