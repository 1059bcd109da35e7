/** Lock-outs and proving runs, on paper; a frost limit of 3 °C where there is one. */
import { describe } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import { body, channel, house, rule, source } from './house';
import { hand, holds, lockOut, prove, proveEnd, unlock } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const cold = { ...warm, bench: 3.5 };
const fan = (
  more: Partial<ChannelConfig> = {},
  house_: Partial<HouseConfig> & { frostLimit?: number } = {},
) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', body())], ...house_ });

describe('lock-out', () => {
  holds('ends a hand on and a pulse for good: taking it off starts nothing', {
    config: fan({ minOnS: 600 }),
    reads: warm,
    rows: [
      [10, hand('on', 7200), 'on hand'],
      [20, lockOut(), 'off lock-out'],
      [30, unlock(), 'off idle'],
      [40, prove(60), 'on proving'],
      [50, lockOut(), 'off lock-out'],
      [60, unlock(), 'off idle'],
    ],
  });

  holds('takes no hand on and no pulse; a hand off stays', {
    config: fan(),
    reads: cold,
    rows: [
      [10, lockOut(), 'off lock-out'],
      [20, hand('on', 7200), 'off lock-out'],
      [30, prove(60), 'off lock-out'],
      [40, hand('off', 600), 'off lock-out'],
      [50, unlock(), 'off hand'],
      [640, null, 'on band'],
    ],
  });

  holds('of two is off till both are taken off, frost or not, and then waits for least off', {
    config: fan({ frostHelp: true, minOffS: 180 }, { frostLimit: 3 }),
    reads: { ...warm, air: 2 },
    rows: [
      [10, lockOut('fan', 'a'), 'off lock-out'],
      [20, lockOut('fan', 'b'), 'off lock-out'],
      [30, unlock('fan', 'a'), 'off lock-out'],
      [40, unlock('fan', 'b'), 'off short-cycle'],
      [190, null, 'on frost'],
    ],
  });
});

describe('proving', () => {
  holds('ends at once when whoever watches says stop, as it would by itself', {
    config: fan({ minOnS: 120, minOffS: 180 }),
    reads: warm,
    rows: [
      [10, prove(60), 'on proving'],
      [20, proveEnd(), 'off idle'],
      // least off runs from there: the band has to wait for it
      [21, (play) => play.reads({ ...warm, bench: 3 }), 'off short-cycle'],
      [200, null, 'on band'],
      // a stop without a run stops nothing
      [210, proveEnd(), 'on band'],
    ],
  });

  holds('begins no least on, breaks least off, and its end begins least off', {
    config: fan({ minOnS: 120, minOffS: 180 }),
    reads: warm,
    rows: [
      [10, prove(10), 'on proving'],
      [20, null, 'off idle'],
      [30, prove(60), 'on proving'],
      [90, null, 'off idle'],
      [95, { bench: 3.5 }, 'off short-cycle'],
      [269.999, null, 'off short-cycle'],
      [270, null, 'on band'],
    ],
  });

  holds('goes over into the band’s draw where that wants it, with its least on from there', {
    config: fan({ minOnS: 120 }),
    reads: warm,
    rows: [
      [10, prove(60), 'on proving'],
      [40, { bench: 3.5 }, 'on proving'],
      [70, { bench: 9 }, 'off idle'],
      [100, prove(10), 'on proving'],
      [105, { bench: 3.5 }, 'on proving'],
      [110, null, 'on band'],
      [120, { bench: 9 }, 'on short-cycle'],
      [229.999, null, 'on short-cycle'],
      [230, null, 'off idle'],
    ],
  });

  holds('is 60 s at most, of a channel that draws 600 s, and nothing on a load that runs', {
    config: fan(
      {},
      { sources: [source('heap')], channels: [channel('fan', 1, { source: 'heap' }), channel('lamp', 2)] },
    ),
    reads: warm,
    rows: [
      [10, prove(61, 'lamp'), { lamp: 'off idle' }],
      [20, prove(60, 'lamp'), { lamp: 'on proving' }],
      [30, prove(601), 'off idle'],
      [40, prove(600), 'on proving'],
      [639.999, null, 'on proving'],
      [640, { bench: 3.5 }, 'on band'],
      [650, prove(60), 'on band'],
    ],
  });
});
