// The lease: whatever happens upstream, a coil that nobody renews drops.
import { Broken, LEASE_S, LeftOut, SLACK_MS, seconds } from './bench.mjs';

const isOff = (line) => Object.values(line.lastRelays.frame.channels).every((coil) => coil === 'off');

/** Waits until every coil is off by the node's own word. @returns the monotonic ms of the report that says so */
async function dropped(bench, line, limitMs) {
  await bench.until('every coil off', () => isOff(line), limitMs);
  return line.lastRelays.at;
}

/** Relay 1 on; from then on nothing is answered. @returns when the frame that the last command answered had come */
async function lastCommand(bench) {
  await bench.welcomed();
  await bench.order({});
  const { line } = bench;
  line.order = null;
  const { at, frame } = await bench.report();
  line.command({ number: bench.nextNumber(), channels: { 1: 'on' } }, { seen: frame.seq });
  await bench.until('relay 1 on', () => line.lastRelays.frame.channels[1] === 'on', 2000 + SLACK_MS);
  return { line, seenAt: at };
}

/** A drop well before its time is a lease that was not granted; a drop after it is the fault that kills. */
function judge(bench, heldMs, leaseMs) {
  if (heldMs > leaseMs + SLACK_MS)
    throw new Broken(`it dropped after ${seconds(heldMs)}, the lease was ${seconds(leaseMs)}`);
  if (heldMs < leaseMs * 0.8)
    throw new Broken(`it dropped after ${seconds(heldMs)} of a lease of ${seconds(leaseMs)}`);
}

export const lease = [
  {
    promise: 'without renewal every coil drops when the lease ends, and not before',
    look: async (bench, shared) => {
      const tripsBefore = (await bench.welcomed()).lastRelays.frame.trips;
      const { line, seenAt } = await lastCommand(bench);
      const leaseMs = bench.ms(LEASE_S);
      judge(bench, (await dropped(bench, line, 2 * leaseMs + SLACK_MS)) - seenAt, leaseMs);
      shared.trips = [tripsBefore, line.lastRelays.frame.trips];
    },
  },
  {
    promise: 'the trip is counted, once',
    look: async (bench, { trips }) => {
      if (trips === undefined) throw new LeftOut('its coils did not drop');
      if (trips[1] !== trips[0] + 1) throw new Broken(`trips went from ${trips[0]} to ${trips[1]}`);
    },
  },
  {
    promise: 'a renewal of the same number keeps the coil on, without a trip',
    look: async (bench) => {
      await bench.welcomed();
      await bench.order({ 1: 'on' });
      const { line } = bench;
      const from = line.of('relays').length;
      await bench.pause(2 * bench.ms(LEASE_S));
      const since = line.of('relays').slice(from);
      const off = since.find(({ frame }) => frame.channels[1] !== 'on');
      if (off !== undefined) throw new Broken('the coil dropped though each report was answered');
      if (since.length < 3) throw new Broken(`only ${since.length} reports came in two leases`);
      await bench.order({});
    },
  },
  {
    promise: 'the lease counts from when it sent the frame, not from when the command came',
    look: async (bench) => {
      await bench.welcomed();
      await bench.order({});
      const { line } = bench;
      line.order = null;
      const { at, frame } = await bench.report();
      await bench.pause(bench.ms(LEASE_S) * 0.6);
      line.command({ number: bench.nextNumber(), channels: { 1: 'on' } }, { seen: frame.seq });
      await bench.until('relay 1 on', () => line.lastRelays.frame.channels[1] === 'on', 2000);
      const leaseMs = bench.ms(LEASE_S);
      judge(bench, (await dropped(bench, line, 2 * leaseMs + SLACK_MS)) - at, leaseMs);
    },
  },
  {
    promise: 'a command whose lease is over when it comes leaves the coil off',
    look: async (bench) => {
      await bench.welcomed();
      await bench.order({});
      const { line } = bench;
      line.order = null;
      const { frame } = await bench.report();
      await bench.pause(bench.ms(LEASE_S) + 200);
      const from = line.of('relays').length;
      line.command({ number: bench.nextNumber(), channels: { 1: 'on' } }, { seen: frame.seq });
      await bench.report();
      const on = line
        .of('relays')
        .slice(from)
        .some((one) => one.frame.channels[1] === 'on');
      if (on) throw new Broken('it switched the coil on');
    },
  },
  {
    promise: 'with the line cut the coil drops all the same, and the trip is told when it is back',
    look: async (bench, shared) => {
      await bench.welcomed();
      await bench.order({ 1: 'on' });
      const { frame: former } = bench.line.lastRelays;
      shared.former = { seq: former.seq, boot: bench.line.hello.boot };
      const line = await bench.again({ closedForMs: bench.ms(LEASE_S) + SLACK_MS });
      const [first] = line.of('relays');
      if (line.hello.boot !== shared.former.boot)
        throw new Broken('it started anew: its boot changed when the line did');
      const on = Object.entries(first.frame.channels).filter(([, coil]) => coil === 'on');
      if (on.length > 0) throw new Broken(`relay ${on.map(([relay]) => relay).join()} is still on`);
      if (first.frame.trips !== former.trips + 1)
        throw new Broken(`trips went from ${former.trips} to ${first.frame.trips}`);
      shared.line = line;
    },
  },
  {
    promise: 'seq goes on counting over connections of one boot',
    look: async (bench) => {
      const byBoot = new Map();
      for (const line of bench.connections) {
        for (const { frame } of line.frames.filter((one) => one.frame.type !== 'hello')) {
          const before = byBoot.get(line.hello.boot) ?? -1;
          if (frame.seq <= before)
            throw new Broken(`seq ${frame.seq} of ${frame.type} comes after ${before}`);
          byBoot.set(line.hello.boot, frame.seq);
        }
      }
      if (bench.connections.filter(({ hello }) => hello !== undefined).length < 2)
        throw new LeftOut('it never came back');
    },
  },
  {
    promise: 'a command that answers a frame of a former connection is ignored',
    look: async (bench, { former, line }) => {
      if (line === undefined || line.closed !== null) throw new LeftOut('it did not come back');
      line.command({ number: bench.nextNumber(), channels: { 1: 'on' } }, { seen: former.seq });
      const { frame } = await bench.report(line);
      if (frame.channels[1] === 'on') throw new Broken('it switched the coil on');
      await bench.order({});
    },
  },
];
