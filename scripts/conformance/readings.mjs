// Readings: none that was taken is lost before somebody has said that it is kept.
import { Broken, LeftOut, SLACK_MS, seconds } from './bench.mjs';
import { resolved } from './connection.mjs';

const PACK_MOST = 100;
/** A clock may be off by this before readings are refused, s. */
const AHEAD_S = 120;
/** So many waiting records need more than one pack. */
const WAITING = 130;
const OFFLINE_MOST_MS = 20_000;

/** The records of a line, each with its pack. */
export const recordsOf = (bench, line) =>
  line
    .of('readings')
    .flatMap(({ at, frame }, pack) =>
      resolved(frame.pack, bench.now()).map((record) => ({ ...record, at, pack })),
    );

/** As Map.groupBy, which Node 20 does not have. */
function grouped(records, keyOf) {
  const groups = new Map();
  for (const record of records) groups.set(keyOf(record), [...(groups.get(keyOf(record)) ?? []), record]);
  return groups;
}

const idOf = ({ n, t }) => `${n} ${t}`;

/** A line on which readings come; a node that measures nothing is let off. */
export async function measuring(bench) {
  const line = await bench.welcomed();
  const limitMs = 3 * bench.ms(bench.reportS) + 5000;
  try {
    await bench.until('readings', () => line.of('readings').length > 0, limitMs);
  } catch {
    throw new LeftOut(`no readings came in ${seconds(limitMs)}: give it a sensor for this`);
  }
  return line;
}

export const readings = [
  {
    promise: 'readings are SenML: a name, a unit, a number and an absolute time that is not ahead',
    look: async (bench) => {
      const line = await measuring(bench);
      for (const { n, u, v, t, isRelative } of recordsOf(bench, line)) {
        if (!/^[A-Za-z0-9][A-Za-z0-9\-:./_]*$/.test(n)) throw new Broken(`the name ${JSON.stringify(n)}`);
        if (typeof u !== 'string') throw new Broken(`${n} has no unit`);
        if (typeof v === 'number' && !Number.isFinite(v)) throw new Broken(`${n} is ${v}`);
        if (isRelative) throw new Broken(`${n} has a relative time, though the welcome said what time it is`);
        if (t > bench.now() + AHEAD_S) throw new Broken(`${n} is ${Math.round(t - bench.now())} s ahead`);
      }
    },
  },
  {
    promise: 'they are taken at the interval that the welcome gives',
    look: async (bench) => {
      await measuring(bench);
      bench.reportS = 20;
      const line = await bench.again();
      await bench.pause(6 * bench.ms(bench.reportS));
      const byName = grouped(recordsOf(bench, line), ({ n }) => n);
      const [name, records = []] = [...byName][0] ?? [];
      const stamps = [...new Set(records.map(({ t }) => t))].filter(
        (t) => t > bench.now() - 5.5 * bench.reportS,
      );
      if (stamps.length < 3)
        throw new Broken(`${stamps.length} readings of ${name ?? 'any point'} in six intervals`);
      if (stamps.length > 8) throw new Broken(`${stamps.length} readings of ${name} in six intervals`);
    },
  },
  {
    promise: 'what was not acknowledged is sent again on the next connection, with the same time and value',
    look: async (bench) => {
      await measuring(bench);
      bench.reportS = 5;
      const deaf = await bench.again({ isAcking: false });
      await bench.until('readings', () => deaf.of('readings').length > 1, 4 * bench.ms(bench.reportS) + 5000);
      const sent = new Map(recordsOf(bench, deaf).map((record) => [idOf(record), record.v]));
      const line = await bench.again();
      const came = () => new Map(recordsOf(bench, line).map((record) => [idOf(record), record.v]));
      const missing = () => [...sent.keys()].filter((id) => !came().has(id));
      await bench
        .until('all that was not acknowledged', () => missing().length === 0, 8000 + SLACK_MS)
        .catch(() => {
          throw new Broken(`${missing().length} of ${sent.size} did not come again, such as ${missing()[0]}`);
        });
      const other = [...sent].find(([id, v]) => came().get(id) !== v);
      if (other !== undefined) throw new Broken(`${other[0]} was ${other[1]} and is ${came().get(other[0])}`);
    },
  },
  {
    promise: 'what was measured without a line comes when there is one, without a hole',
    look: async (bench, shared) => {
      const before = await measuring(bench);
      const names = new Set(recordsOf(bench, before).map(({ n }) => n)).size;
      bench.reportS = 5;
      // the line is up for a moment so that the interval is known
      await bench.again();
      const from = bench.now();
      const offlineMs = Math.min(
        OFFLINE_MOST_MS,
        Math.max(6000, (WAITING / names) * bench.ms(bench.reportS)),
      );
      const line = await bench.again({ closedForMs: offlineMs });
      const until = bench.now();
      shared.back = line;
      const stamps = () => [...new Set(recordsOf(bench, line).map(({ t }) => t))].sort((a, b) => a - b);
      const hole = () => {
        const all = [from, ...stamps().filter((t) => t > from && t < until), until];
        return Math.max(...all.slice(1).map((t, before) => t - all[before]));
      };
      const most = 3 * bench.reportS + bench.rate;
      await bench
        .until('readings of all that time', () => hole() <= most, 10_000)
        .catch(() => {
          throw new Broken(
            `there is a hole of ${Math.round(hole())} s in ${Math.round(until - from)} s (app time)`,
          );
        });
    },
  },
  {
    promise: 'the newest of each point comes first',
    look: async (bench, { back }) => {
      if (back === undefined) throw new LeftOut('it did not come back with readings');
      const records = recordsOf(bench, back);
      const first = records.filter(({ pack }) => pack === 0);
      const backAt = back.of('readings')[0].at;
      for (const { n, t } of first) {
        // what was taken after the first pack left is no older reading that came late
        const newer = records.find(
          (one) => one.n === n && one.t > t && one.pack > 0 && isOlderThan(bench, one, backAt),
        );
        if (newer !== undefined) throw new Broken(`${n} of ${t} came before that of ${newer.t}`);
      }
      const missing = new Set(records.map(({ n }) => n));
      for (const { n } of first) missing.delete(n);
      if (missing.size > 0 && first.length < PACK_MOST)
        throw new Broken(`the first pack has nothing of ${[...missing].join(', ')}`);
    },
  },
  {
    promise: 'the rest follows, the oldest first',
    look: async (bench, { back }) => {
      if (back === undefined) throw new LeftOut('it did not come back with readings');
      const backAt = back.of('readings')[0].at;
      const rest = recordsOf(bench, back).filter((one) => one.pack > 0 && isOlderThan(bench, one, backAt));
      const packs = [...grouped(rest, ({ pack }) => pack).values()].map((pack) => pack.map(({ t }) => t));
      if (packs.length < 1) throw new LeftOut('too few readings waited for a second pack');
      const turned = packs.findIndex(
        (times, at) => at > 0 && Math.min(...times) < Math.max(...packs[at - 1]) - 1,
      );
      if (turned > 0)
        throw new Broken(
          `a pack from ${Math.min(...packs[turned])} came after one to ${Math.max(...packs[turned - 1])}`,
        );
    },
  },
  {
    promise: 'no pack has more than 100 records',
    look: async (bench) => {
      const sizes = bench.connections.flatMap((line) =>
        line.of('readings').map(({ frame }) => frame.pack.length),
      );
      if (sizes.length === 0) throw new LeftOut('no readings came');
      const most = Math.max(...sizes);
      if (most > PACK_MOST) throw new Broken(`one has ${most}`);
    },
  },
  {
    promise: 'what was acknowledged is not sent for ever',
    look: async (bench) => {
      const line = await measuring(bench);
      await bench.pause(3 * bench.ms(bench.reportS) + 3000);
      const again = recordsOf(bench, line).find(
        (one) => one.at > (line.acked.get(idOf(one)) ?? Infinity) + 2000,
      );
      if (again !== undefined)
        throw new Broken(`${idOf(again)} came again two seconds after it was acknowledged`);
    },
  },
];

/** Taken before the node was back, by a second or two of app time for the way. */
function isOlderThan(bench, { t }, atMs) {
  const agoS = ((performance.now() - atMs) / 1000) * bench.rate;
  return t < bench.now() - agoS - bench.rate;
}
