/**
 * Noise as a pure function of where it is asked: the same seed and place give the same value for ever, so a
 * yard can be restarted, or asked about any moment, and nothing has to be remembered.
 */

/** A number from 0 up to 1 for a seed, a name and a whole number. */
export function uniform(seed: number, name: string, at: number): number {
  let h = (seed ^ 0x9e3779b9) >>> 0;
  for (let i = 0; i < name.length; i += 1) h = mixed(h ^ name.charCodeAt(i));
  h = mixed(h ^ (at >>> 0));
  // Times in milliseconds need more than 32 bits: the high part is mixed in by itself.
  h = mixed(h ^ (Math.floor(at / 2 ** 32) >>> 0));
  return h / 2 ** 32;
}

/** Nearly normal, mean 0, standard deviation 1, never beyond 3.5: a sensor's noise has ends. */
export function normal(seed: number, name: string, at: number): number {
  let sum = 0;
  for (let i = 0; i < 4; i += 1) sum += uniform(seed + i * 7919, name, at);
  return (sum - 2) * Math.sqrt(3);
}

/** Smooth noise from −1 to 1 with one independent knot each `period`. */
export function smooth(seed: number, name: string, at: number, period: number): number {
  const place = at / period;
  const knot = Math.floor(place);
  const share = eased(place - knot);
  const from = uniform(seed, name, knot);
  const to = uniform(seed, name, knot + 1);
  return 2 * (from + (to - from) * share) - 1;
}

/** 0 to 1 with level ends. */
export function eased(share: number): number {
  const s = Math.min(1, Math.max(0, share));
  return s * s * (3 - 2 * s);
}

function mixed(value: number): number {
  let h = value >>> 0;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}
