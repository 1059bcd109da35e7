/** Chance that can be had again: figures from 0 to 1 by a seed (a counter mixed, as in splitmix32), and normal ones. */
export interface Chance {
  uniform: () => number;
  normal: () => number;
}

export function chance(seed: number): Chance {
  let count = seed;
  const uniform = () => {
    count = (count + 0x9e3779b9) | 0;
    let h = count;
    h = Math.imul(h ^ (h >>> 16), 0x21f0aaad);
    h = Math.imul(h ^ (h >>> 15), 0x735a2d97);
    return ((h ^ (h >>> 15)) >>> 0) / 2 ** 32;
  };
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}
