/**
 * Steps of ordinary differential equations by the classical Runge-Kutta method of fourth order.
 *
 * Stable for steps up to 2.78 times the shortest time constant, and exact to some (step / constant)^5. The
 * quickest lump of a yard, the air of a light house or the bed beside a pipe, has some 900 s; with
 * sub-steps of 60 s at most the error of a night is under a thousandth of a kelvin.
 */

/** Longest sub-step, s. */
export const subStepSMax = 60;

export type Rates = (state: readonly number[], timeS: number) => number[];

/**
 * Advances `state` by `dtS` seconds from `timeS` on, in equal sub-steps.
 *
 * @param state any lumps and any running totals of flows: both are integrated by the same weights, so a
 *   sum of flows equals the change of what they fill to the last digits
 * @param rates change a second of each entry
 * @returns the new state; the old one is untouched
 */
export function advance(state: readonly number[], timeS: number, dtS: number, rates: Rates): number[] {
  const steps = Math.max(1, Math.ceil(dtS / subStepSMax - 1e-9));
  const h = dtS / steps;
  let current = [...state];
  for (let step = 0; step < steps; step += 1) {
    const t = timeS + step * h;
    const k1 = rates(current, t);
    const k2 = rates(shifted(current, k1, h / 2), t + h / 2);
    const k3 = rates(shifted(current, k2, h / 2), t + h / 2);
    const k4 = rates(shifted(current, k3, h), t + h);
    current = current.map((value, i) => {
      const slope = (k1[i] ?? 0) + 2 * (k2[i] ?? 0) + 2 * (k3[i] ?? 0) + (k4[i] ?? 0);
      return value + (h / 6) * slope;
    });
  }
  return current;
}

function shifted(state: readonly number[], slope: readonly number[], by: number): number[] {
  return state.map((value, i) => value + by * (slope[i] ?? 0));
}

/** First-order approach to `target` over `dtS` with time constant `tauS`, exact for any step. */
export function approach(value: number, target: number, dtS: number, tauS: number): number {
  return target + (value - target) * Math.exp(-dtS / tauS);
}
