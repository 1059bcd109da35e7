/** What the model once found wrong, shrunk, as cases of their own. */
import { expect, it } from 'vitest';
import { body, channel, house, interlock, rest, rule, S, source } from './house';
import { Player } from './player';

const cold = { bench: 3, air: 10, core: 50, base: 40 };

it('a longest run whose least off is nothing ends by limit and begins anew, both at its instant', () => {
  const fan = channel('fan', 1, { longestOnS: 300, frostHelp: true });
  const player = new Player(house({ frostLimit: 3, channels: [fan] }), { bench: 1, air: 1 });
  player.pass(299 * S).now += S;
  player.step();
  expect(player.switchings()).toEqual([
    [0, 'on', 'frost'],
    [300, 'off', 'limit'],
    [300, 'on', 'frost'],
  ]);
  const told = player.events.flatMap((event) => (event.kind === 'switching' ? [event.explanation] : []));
  expect(told.map((one) => [one.state, one.claim, one.ladder.at(-1)?.claim])).toEqual([
    ['on', 'frost', 'frost'],
    ['off', 'limit', 'limit'],
    ['on', 'frost', 'frost'],
  ]);
});

it('a channel without a rest that draws on a heap with one leaves a memory that reads back to the bit', () => {
  const config = house({
    sources: [source('heap')],
    channels: [channel('fan', 1, { source: 'heap' }), channel('free', 2, { source: 'heap' })],
    rules: [rule('fan', body({ rest: rest(600, 1200) }))],
  });
  const player = new Player(config, { ...cold, bench: 9 });
  player.order({ kind: 'hand', channel: 'free', state: 'on', seconds: 60, holdInFrost: false });
  expect(JSON.parse(JSON.stringify(player.memory))).toStrictEqual(player.memory);
});

it('a load that gives way in never-with is told of as switched off by the interlock', () => {
  const config = house({
    channels: [channel('fan', 1), channel('vent', 2, { minOnS: 120 })],
    rules: [rule('fan', body()), rule('vent', body({ point: 'air' }))],
    interlocks: [interlock('never-with', 'vent', 'fan', { delayS: 5 })],
  });
  const player = new Player(config, { bench: 9, air: 3 });
  player.pass(30 * S);
  player.at({ air: 9 }).at({ bench: 3 });
  expect(player.switchings('vent').map(([, to, claim]) => [to, claim])).toEqual([
    ['on', 'band'],
    ['off', 'interlock'],
  ]);
});
