/** A loop with two fans on one heap, the first with a least gain of 3 K after 900 s. */
import { body, channel, house, point, rest, rule, source } from './house';

export const cold = { bench: 3, air: 10, core: 50, base: 40, in: 5, out: 5 };
export const gain = { kelvin: 3, after: 900, intake: 'in', return: 'out' };
const fan = (key: string, number: number, more = {}) => channel(key, number, { source: 'heap', ...more });
export const config = (more = {}, restMore = {}, frostLimit: number | null = null) =>
  house({
    frostLimit,
    points: [...house().points, point('in', 'loop-intake'), point('out', 'loop-return')],
    sources: [source('heap')],
    channels: [fan('fan', 1, { frostHelp: true, ...more }), fan('second', 2)],
    rules: [
      rule('fan', body({ rest: rest(7200, 1200, { leastGain: gain, ...restMore }) })),
      rule('second', body({ point: 'air', rest: rest(7200, 1200) })),
    ],
  });
