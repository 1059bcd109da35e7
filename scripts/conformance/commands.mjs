// What a node obeys, and what it does not.
import { Broken, LeftOut } from './bench.mjs';

const EPOCH = 2 ** 32;

/** Relay 1 is on under an order that is renewed; then one command comes that must change nothing. */
async function ignores(bench, what, over, numberOf = () => bench.nextNumber()) {
  await bench.welcomed();
  const order = await bench.order({ 1: 'on' });
  const { line } = bench;
  line.order = null;
  line.command({ number: numberOf(order.number), channels: { 2: 'on' } }, over);
  const { frame } = await bench.report();
  line.order = order;
  if (frame.channels[1] !== 'on' || frame.channels[2] === 'on')
    throw new Broken(`${what} moved its coils: ${JSON.stringify(frame.channels)}`);
  if (frame.number !== order.number)
    throw new Broken(`${what} counts as seen: its number is ${frame.number}`);
  line.command(order);
}

async function needs(bench, relays) {
  const { hello } = await bench.welcomed();
  if (hello.channels < relays) throw new LeftOut(`needs a node of ${relays} relays`);
}

export const commands = [
  {
    promise: 'a command moves the coil, and is answered with relays that have its number',
    look: async (bench) => {
      await needs(bench, 1);
      await bench.order({ 1: 'on' });
    },
  },
  {
    promise: 'a relay that a command does not name is off',
    look: async (bench) => {
      await needs(bench, 2);
      await bench.order({ 1: 'on', 2: 'on' });
      await bench.order({ 2: 'on' });
    },
  },
  {
    promise: 'a command of a lower number is ignored',
    look: async (bench) => {
      await needs(bench, 2);
      await ignores(bench, 'a lower number', {}, (number) => number - 1);
    },
  },
  {
    promise: 'numbers are compared whole, beyond 32 bits',
    look: async (bench) => {
      await needs(bench, 2);
      // the lower one has the greater lower half
      bench.nextNumber((Math.floor(bench.nextNumber() / EPOCH) + 1) * EPOCH);
      await ignores(bench, 'a number lower by 2^32', {}, (number) => number - EPOCH + 1000);
    },
  },
  {
    promise: 'a command for another boot is ignored',
    look: async (bench) => {
      await needs(bench, 2);
      await ignores(bench, 'a command for another boot', { boot: 'of-another-start' });
    },
  },
  {
    promise: 'a command that answers no relays frame of this connection is ignored',
    look: async (bench) => {
      await needs(bench, 2);
      await ignores(bench, 'an answer to a frame that it never sent', { seen: 1_000_000_000 });
      const other = bench.line.of('readings').at(-1)?.frame.seq;
      if (other !== undefined) await ignores(bench, 'an answer to a readings frame', { seen: other });
    },
  },
  {
    promise: 'a frame that it does not know, or cannot read, does it no harm',
    look: async (bench) => {
      await needs(bench, 1);
      for (const odd of ['not JSON', '[]', '{}', '{"type":"of-a-later-version"}', '{"type":"command"}'])
        bench.line.send(odd);
      await bench.order({});
      await bench.order({ 1: 'on' });
      await bench.order({});
    },
  },
];
