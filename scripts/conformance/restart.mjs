// A power cut: the coils, the numbers and the boot begin anew.
import { Broken, LeftOut } from './bench.mjs';

export const restart = [
  {
    promise: 'after a power cut every coil is off, whatever was on before',
    look: async (bench, shared) => {
      await bench.welcomed();
      await bench.order({ 1: 'on' });
      shared.before = bench.line.hello.boot;
      const line = await bench.powerCut();
      bench.welcome(line);
      const { frame } = await bench.until('relays after the welcome', () => line.of('relays')[0], 5000);
      shared.after = { boot: line.hello.boot, frame };
      const on = Object.entries(frame.channels).filter(([, coil]) => coil === 'on');
      if (on.length > 0) throw new Broken(`relay ${on.map(([relay]) => relay).join()} is on`);
    },
  },
  {
    promise: 'its boot is a new one',
    look: async (_bench, { before, after }) => {
      if (after === undefined) throw new LeftOut('there was no power cut');
      if (after.boot === before) throw new Broken(`the boot is ${JSON.stringify(before)} as before`);
    },
  },
  {
    promise: 'it has seen no command in this boot, and counts no trips',
    look: async (_bench, { after }) => {
      if (after === undefined) throw new LeftOut('there was no power cut');
      const { number, trips } = after.frame;
      if ((number ?? 0) !== 0) throw new Broken(`its number is ${number}`);
      if (trips !== 0) throw new Broken(`trips is ${trips}`);
    },
  },
  {
    promise: 'it is driven again, by a lower number too',
    look: async (bench, { after }) => {
      if (after === undefined) throw new LeftOut('there was no power cut');
      const line = await bench.welcomed();
      const order = { number: 1, channels: { 1: 'on' } };
      line.order = order;
      line.command(order);
      await bench.until('relay 1 on', () => line.lastRelays.frame.channels[1] === 'on', 3000);
      await bench.order({});
    },
  },
];
