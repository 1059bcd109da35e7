/** A contour's rings as one SVG path. */
export function geoPathOf(
  polygons: readonly (readonly (readonly number[])[])[][] | readonly number[][][][],
  at: (x: number, y: number) => [number, number],
): string {
  return polygons
    .flatMap((rings) => rings.map((ring) => `M${ring.map(([x = 0, y = 0]) => pointOf(at(x, y))).join('L')}Z`))
    .join('');
}

const pointOf = ([x, y]: [number, number]) => `${Number(x.toFixed(1))},${Number(y.toFixed(1))}`;
