/** What a proving run leaves behind where something above it ended the load's running first. On paper. */
import { body, channel, house, rule } from './house';
import { holds, prove } from './table';

// off by its limit from 20 s on, so that its least off is over at 110 s, whenever the pulse was
holds('a pulse begins no least time for a load that its limit had stopped before', {
  config: house({
    channels: [channel('fan', 1, { minOffS: 90, highLimit: { point: 'core', above: 60 } })],
    rules: [rule('fan', body())],
  }),
  reads: { bench: 9, core: 50 },
  rows: [
    [10, prove(60), 'on proving'],
    [20, { core: 61 }, 'off limit'],
    [30, { bench: 3 }, 'off limit'],
    [80, { core: 50 }, 'off short-cycle'],
    [109.999, null, 'off short-cycle'],
    [110, null, 'on band'],
  ],
});
