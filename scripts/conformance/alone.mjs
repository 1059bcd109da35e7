// What a node does by itself while nobody commands it: nothing, or the fallback that it was given.
import { Broken, LEASE_S, LeftOut, SLACK_MS, seconds } from './bench.mjs';
import { resolved } from './connection.mjs';

const ON_FOR_S = 40;
const OFF_FOR_S = 40;
/** A sensor may be looked at this seldom, s of app time. */
const LOOKS_S = 10;

const coil = (line, relay = 1) => line.lastRelays.frame.channels[relay];

/** A temperature that this node measures now, for a fallback that must act or must not. */
async function temperature(bench) {
  const line = await bench.welcomed();
  if (line.hello.can?.includes('fallback') !== true) throw new LeftOut('its hello does not say that it can');
  const records = () =>
    bench.connections.flatMap((one) =>
      one.of('readings').flatMap(({ frame }) => resolved(frame.pack, bench.now())),
    );
  const found = () => records().findLast(({ u, v }) => u === 'Cel' && v > -50 && v < 80);
  try {
    return await bench.until('a temperature', found, 3 * bench.ms(bench.reportS) + 5000);
  } catch {
    throw new LeftOut('it measures no temperature');
  }
}

/** The node is given this fallback for relay 1, and from then on nobody commands it though the line is up. */
async function leaveAlone(bench, fallback) {
  await bench.welcomed();
  const { line } = bench;
  await bench.order({}, fallback);
  line.order = null;
  const { at } = line.lastRelays;
  return { line, aloneAt: at + bench.ms(LEASE_S) };
}

const setting = (point, below) => ({
  1: { point, below, above: below + 5, onFor: ON_FOR_S, offFor: OFF_FOR_S },
});

/** The coil stays off for as long after the lease as a fallback would need to begin. */
async function staysOff(bench, fallback, what) {
  const { line, aloneAt } = await leaveAlone(bench, fallback);
  const from = line.of('relays').length;
  await bench.pause(aloneAt - performance.now() + bench.ms(2 * LOOKS_S) + SLACK_MS);
  const on = line
    .of('relays')
    .slice(from)
    .find(({ frame }) => Object.values(frame.channels).includes('on'));
  if (on !== undefined) throw new Broken(`${what}, and a coil is on`);
}

export const alone = [
  {
    promise: 'without a fallback every coil stays off while nobody commands it',
    look: async (bench) => staysOff(bench, undefined, 'no fallback was given'),
  },
  {
    promise: 'when the last command has run out it runs the kept fallback, and not before',
    look: async (bench, shared) => {
      const { n, v } = await temperature(bench);
      const { line, aloneAt } = await leaveAlone(bench, setting(n, v + 20));
      shared.on = await bench.until(
        `relay 1 on: ${n} is ${v} °C, the fallback says below ${v + 20}`,
        () =>
          line
            .of('relays')
            .find(({ at, frame }) => at > aloneAt - bench.ms(LEASE_S) && frame.channels[1] === 'on'),
        aloneAt - performance.now() + bench.ms(2 * LOOKS_S) + SLACK_MS,
      );
      shared.line = line;
      if (shared.on.at < aloneAt - bench.ms(LEASE_S) * 0.2)
        throw new Broken('it began while a command was still in force');
    },
  },
  {
    promise: 'it never runs longer than onFor',
    look: async (bench, shared) => {
      const { line, on } = shared;
      if (on === undefined) throw new LeftOut('it did not run');
      const most = bench.ms(ON_FOR_S) + SLACK_MS;
      await bench.until('relay 1 off again', () => coil(line) === 'off', most + SLACK_MS);
      shared.off = line.lastRelays;
      if (shared.off.at - on.at > most)
        throw new Broken(`it ran ${seconds(shared.off.at - on.at)} of ${seconds(bench.ms(ON_FOR_S))}`);
    },
  },
  {
    promise: 'then it is off for offFor, and only then runs again',
    look: async (bench, shared) => {
      const { line, off } = shared;
      if (off === undefined) throw new LeftOut('no run ended');
      const again = await bench.until(
        'the next run',
        () => line.of('relays').find(({ at, frame }) => at > off.at && frame.channels[1] === 'on'),
        bench.ms(OFF_FOR_S + 2 * LOOKS_S) + SLACK_MS,
      );
      const restedMs = again.at - off.at;
      if (restedMs < bench.ms(OFF_FOR_S) - 300)
        throw new Broken(`it was off for ${seconds(restedMs)} of ${seconds(bench.ms(OFF_FOR_S))}`);
    },
  },
  {
    promise: 'only the relay that has a fallback runs',
    look: async (_bench, { line, on }) => {
      if (on === undefined) throw new LeftOut('it did not run');
      const others = ({ frame }) =>
        Object.entries(frame.channels).filter(([relay, one]) => relay !== '1' && one === 'on');
      const found = line.of('relays').find((report) => report.at >= on.at && others(report).length > 0);
      if (found !== undefined) throw new Broken(`relay ${others(found)[0][0]} is on`);
    },
  },
  {
    promise: 'the next command ends it',
    look: async (bench, { line }) => {
      if (line === undefined) throw new LeftOut('it did not run');
      const { n, v } = await temperature(bench);
      await bench.order({}, setting(n, v + 20));
      await bench.report();
      if (coil(line) === 'on') throw new Broken('relay 1 is on though a command says off');
    },
  },
  {
    promise: 'its log tells what it did: "fallback on at=… relay=…", "fallback off …"',
    look: async (bench, { line }) => {
      if (line === undefined) throw new LeftOut('it did not run');
      const told = (what) =>
        line
          .of('log')
          .some(
            ({ frame }) =>
              new RegExp(`^fallback ${what} .*\\brelay=1\\b`).test(frame.text) && /\bat=\d+/.test(frame.text),
          );
      await bench.until('both lines in log frames', () => told('on') && told('off'), 3000);
    },
  },
  {
    promise: 'a fallback is kept over a power cut, and a run before it is not made longer by it',
    look: async (bench) => {
      const { n, v } = await temperature(bench);
      const { line, aloneAt } = await leaveAlone(bench, setting(n, v + 20));
      await bench.until(
        'a run before the power cut',
        () => coil(line) === 'on',
        aloneAt - performance.now() + bench.ms(2 * LOOKS_S) + SLACK_MS,
      );
      const next = await bench.powerCut();
      bench.welcome(next);
      const first = await bench.until('relays after the welcome', () => next.of('relays')[0], 5000);
      if (first.frame.channels[1] === 'on') throw new Broken('relay 1 was on at power-up');
      const limitMs = bench.ms(LEASE_S + OFF_FOR_S + 2 * LOOKS_S) + 5000;
      const on = await bench.until(
        'a run after it',
        () => next.of('relays').find(({ frame }) => frame.channels[1] === 'on'),
        limitMs,
      );
      if (on.at - first.at < bench.ms(OFF_FOR_S) * 0.6)
        throw new Broken(`it ran again ${seconds(on.at - first.at)} after power-up, without its rest`);
      await bench.order({});
    },
  },
  {
    promise: 'a dead point means off',
    look: async (bench) => {
      await temperature(bench);
      await staysOff(bench, setting('no-such-point', 60), 'its fallback names a point without readings');
    },
  },
  {
    promise: 'it does nothing while its point is warm enough',
    look: async (bench) => {
      const { n, v } = await temperature(bench);
      await staysOff(bench, setting(n, v - 20), `${n} is 20 °C over "below"`);
    },
  },
  {
    promise: 'a command without a fallback ends what was kept',
    look: async (bench) => {
      const { n, v } = await temperature(bench);
      await bench.order({}, setting(n, v + 20));
      await staysOff(bench, undefined, 'the last command gave no fallback');
    },
  },
];
