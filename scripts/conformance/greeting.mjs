// How a node comes: its token, its hello, and what it says of its relays.
import { Broken, LeftOut, RELAYS_EVERY_S, SLACK_MS, seconds } from './bench.mjs';

const WAITS_MS = 700;

export const greeting = [
  {
    promise: 'it dials /field/v1 with its token, and says hello first',
    look: async (bench, shared) => {
      const line = await bench.greeted();
      const [first] = line.frames;
      if (first.frame.type !== 'hello') throw new Broken(`its first frame is ${first.frame.type}`);
      shared.line = line;
    },
  },
  {
    promise: 'it says nothing more until it is welcomed',
    look: async (bench, { line }) => {
      if (line === undefined) throw new LeftOut('it did not come');
      await bench.pause(WAITS_MS);
      if (line.frames.length > 1) throw new Broken(`${line.frames[1].frame.type} came before the welcome`);
    },
  },
  {
    promise: 'its first word after the welcome is relays',
    look: async (bench, { line }) => {
      if (line === undefined) throw new LeftOut('it did not come');
      const before = line.frames.length;
      bench.welcome(line);
      const next = await bench.until('a frame after the welcome', () => line.frames[before], 5000);
      if (next.frame.type !== 'relays') throw new Broken(`${next.frame.type} came first`);
    },
  },
  {
    promise: 'it tells of every relay that its hello counts, and of no other',
    look: async (bench) => {
      const line = await bench.welcomed();
      const told = Object.keys(line.lastRelays.frame.channels)
        .map(Number)
        .sort((a, b) => a - b);
      const wanted = Array.from({ length: line.hello.channels }, (_, at) => at + 1);
      if (told.join() !== wanted.join())
        throw new Broken(`hello counts ${wanted.length}, relays tells of ${told.join(', ') || 'none'}`);
    },
  },
  {
    promise: 'at power-up every coil is off, before the first command',
    look: async (bench, { line }) => {
      const first = line?.of('relays')[0]?.frame;
      if (first === undefined) throw new LeftOut('it did not come');
      if ((first.number ?? 0) > 0) throw new LeftOut('it had been commanded already: start it anew for this');
      const on = Object.entries(first.channels).filter(([, coil]) => coil === 'on');
      if (on.length > 0) throw new Broken(`relay ${on.map(([relay]) => relay).join(', ')} is on`);
      if (first.trips !== 0)
        throw new Broken(`it counts ${first.trips} trips in a boot that was never commanded`);
    },
  },
  {
    promise: 'it tells its relays every 10 s',
    look: async (bench) => {
      const line = await bench.welcomed();
      const from = line.of('relays').length - 1;
      await bench.until(
        'three more relays frames',
        () => line.of('relays').length > from + 3,
        4 * bench.ms(RELAYS_EVERY_S) + SLACK_MS,
      );
      const times = line
        .of('relays')
        .slice(from)
        .map(({ at }) => at);
      const longest = Math.max(...times.slice(1).map((at, before) => at - times[before]));
      const most = bench.ms(RELAYS_EVERY_S) + SLACK_MS;
      if (longest > most)
        throw new Broken(
          `${seconds(longest)} between two, where ${seconds(bench.ms(RELAYS_EVERY_S))} is asked`,
        );
    },
  },
  {
    promise: 'every frame has the form of the protocol',
    look: async (bench) => {
      const wrong = bench.connections.flatMap((line) => line.wrong);
      if (wrong.length > 0) throw new Broken(wrong[0]);
    },
  },
];
