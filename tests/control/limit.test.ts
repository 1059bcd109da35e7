/** High limit and longest on, least times, and what decides when nothing can be read. On paper. */
import { describe } from 'vitest';
import type { ChannelConfig, HouseConfig } from '@/lib/control/types';
import type { RuleBody } from '@/lib/control/rule-body';
import { body, channel, house, point, rule } from './house';
import { hand, holds, prove, silent, speaking } from './table';

const warm = { bench: 9, air: 9, core: 50, base: 45 };
const cold = { ...warm, bench: 3.5 };
const fan = (
  more: Partial<ChannelConfig> = {},
  ruleBody: RuleBody = body(),
  house_: Partial<HouseConfig> & { frostLimit?: number } = {},
) => house({ channels: [channel('fan', 1, more)], rules: [rule('fan', ruleBody)], ...house_ });

describe('high limit', () => {
  holds('passed, not reached, puts off, breaks least on, and lets begin a kelvin under it', {
    config: fan({ highLimit: { point: 'air', above: 20 }, minOnS: 600 }),
    reads: cold,
    rows: [
      [60, { air: 20 }, 'on band'],
      [120, { air: 20.01 }, 'off limit'],
      [180, { air: 19.01 }, 'off limit'],
      [240, { air: 19 }, 'on band'],
    ],
  });

  holds('ends a hand on, which does not come back', {
    config: fan({ highLimit: { point: 'air', above: 20 } }),
    reads: warm,
    rows: [
      [10, hand('on', 7200), 'on hand'],
      [60, { air: 21 }, 'off limit'],
      [120, { air: 10 }, 'off idle'],
    ],
  });

  holds('ends a pulse’s draw while it is passed', {
    config: fan({ highLimit: { point: 'air', above: 20 } }),
    reads: warm,
    rows: [
      [10, prove(60), 'on proving'],
      [20, { air: 21 }, 'off limit'],
    ],
  });

  // silent from 60 s on: bad at 150 s
  holds('whose point is bad puts off too', {
    config: fan({ highLimit: { point: 'air', above: 20 } }),
    reads: cold,
    rows: [
      [60, silent('air'), 'on band'],
      [149.999, null, 'on band'],
      [150, null, 'off limit'],
      [200, speaking('air'), 'on band'],
    ],
  });

  holds('is above frost', {
    config: fan({ highLimit: { point: 'core', above: 60 }, frostHelp: true }, body(), { frostLimit: 3 }),
    reads: { ...warm, air: 1 },
    rows: [
      [0, null, 'on frost'],
      [60, { core: 61 }, 'off limit'],
    ],
  });
});

describe('longest on', () => {
  const ten = { longestOnS: 600, minOffS: 60 };

  holds('ends a run, breaking least on, till the band has let go once', {
    config: fan({ ...ten, minOnS: 900 }),
    reads: cold,
    rows: [
      [599.999, null, 'on band'],
      [600, null, 'off limit'],
      [3600, null, 'off limit'],
      [3700, { bench: 8 }, 'off idle'],
      [3760, { bench: 3.5 }, 'on band'],
    ],
  });

  holds('keeps off for least off where the band let go meanwhile', {
    config: fan(ten),
    reads: cold,
    rows: [
      [600, null, 'off limit'],
      [610, { bench: 8 }, 'off limit'],
      [620, { bench: 3.5 }, 'off limit'],
      [659.999, null, 'off limit'],
      [660, null, 'on band'],
      [1260, null, 'off limit'],
    ],
  });

  holds('counts from the start of the run, whoever ran it', {
    config: fan(ten),
    reads: warm,
    rows: [
      [100, hand('on', 300), 'on hand'],
      [350, { bench: 3.5 }, 'on hand'],
      [400, null, 'on band'],
      [699.999, null, 'on band'],
      [700, null, 'off limit'],
    ],
  });

  holds('ends a hand on; what is left wants it off, so least off is all', {
    config: fan(ten),
    reads: warm,
    rows: [
      [100, hand('on', 7200), 'on hand'],
      [700, null, 'off limit'],
      [759.999, null, 'off limit'],
      [760, null, 'off idle'],
    ],
  });

  holds('frost that may break rest waits for least off alone', {
    config: fan({ ...ten, frostHelp: true }, body(), { frostLimit: 3 }),
    reads: { ...warm, air: 2 },
    rows: [
      [600, null, 'off limit'],
      [659.999, null, 'off limit'],
      [660, null, 'on frost'],
      [1260, null, 'off limit'],
    ],
  });

  holds('frost that may not waits to be let go of, as the band does', {
    config: fan(
      { ...ten, frostHelp: true },
      body({ rest: { longestDraw: 7200, least: 60, frostMayBreak: false } }),
      { frostLimit: 3 },
    ),
    reads: { ...warm, air: 2 },
    rows: [
      [600, null, 'off limit'],
      [3600, null, 'off limit'],
      [3700, { air: 9 }, 'off idle'],
      [3800, { air: 2 }, 'on frost'],
    ],
  });
});

describe('least times', () => {
  holds('hold on and off from each switching', {
    config: fan({ minOnS: 120, minOffS: 180 }),
    reads: cold,
    rows: [
      [30, { bench: 8 }, 'on short-cycle'],
      [119.999, null, 'on short-cycle'],
      [120, null, 'off idle'],
      [130, { bench: 3.5 }, 'off short-cycle'],
      [200, { bench: 8 }, 'off idle'],
      [299, { bench: 3.5 }, 'off short-cycle'],
      [299.999, null, 'off short-cycle'],
      [300, null, 'on band'],
    ],
  });

  holds('count as passed before anything is remembered', {
    config: fan({ minOnS: 600, minOffS: 600 }),
    reads: cold,
    rows: [[0, null, 'on band']],
  });
});

describe('fail-safe', () => {
  holds('is the load’s safe state: off where it is wired NO, on where it is NC', {
    config: house({
      channels: [channel('fan', 1), channel('nc', 2, { contact: 'NC' })],
      rules: [rule('fan', body()), rule('nc', body())],
    }),
    reads: warm,
    rows: [
      [0, null, { fan: 'off idle', nc: 'off idle' }],
      [60, silent('bench'), { fan: 'off idle', nc: 'off idle' }],
      [150, null, { fan: 'off fail-safe', nc: 'on fail-safe' }],
      [200, speaking('bench'), { fan: 'off idle', nc: 'off idle' }],
    ],
  });

  holds('waits for the last of the stand-ins, and for every rule', {
    config: house({
      points: [...house().points, point('spare', 'bench')],
      channels: [channel('fan', 1)],
      rules: [
        rule('fan', body({ standIns: [{ point: 'spare', offset: 0 }] }), 'first'),
        rule('fan', body({ point: 'air' }), 'second'),
      ],
    }),
    reads: { ...warm, spare: 9 },
    rows: [
      [60, silent('bench'), 'off idle'],
      [160, silent('spare'), 'off idle'],
      [1000, null, 'off idle'],
      [1060, silent('air'), 'off idle'],
      [1150, null, 'off fail-safe'],
    ],
  });

  holds('does not speak for a rule out of season', {
    config: fan({}, body({ season: { from: '03-01', to: '10-31' } })),
    reads: warm,
    rows: [
      [60, silent('bench'), 'off idle'],
      [1000, null, 'off idle'],
    ],
  });
});
