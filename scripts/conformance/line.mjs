// The line: who dials, who waits, and who notices that nobody is there.
import { Broken, SLACK_MS, seconds } from './bench.mjs';

const BACK_OFF_LEAST_MS = 900; // a timer of one second may come a little early
const BACK_OFF_MOST_MS = 31_000;
const TAKEN_OVER_MS = 60_000;
const SILENCE_MS = 25_000;

export const line = [
  {
    promise: 'a line that is lost is dialled again after 1 to 30 s',
    look: async (bench) => {
      const former = await bench.welcomed();
      former.cut();
      await bench.until('the line down', () => former.closed, 5000);
      const next = await bench.again();
      const afterMs = next.openedAt - former.closed.at;
      if (afterMs < BACK_OFF_LEAST_MS)
        throw new Broken(`it came back after ${seconds(afterMs)}: a thousand nodes would come at once`);
      if (afterMs > BACK_OFF_MOST_MS) throw new Broken(`it came back after ${seconds(afterMs)}`);
    },
  },
  {
    promise: 'it answers a ping',
    look: async (bench) => {
      const open = await bench.welcomed();
      const before = open.pongs;
      open.ping();
      await bench.until('a pong', () => open.pongs > before, 2000 + SLACK_MS);
    },
  },
  {
    promise: 'a line that says nothing for 25 s is given up',
    isSlow: true,
    look: async (bench) => {
      const open = await bench.welcomed();
      open.order = null;
      open.isAcking = false;
      open.isSilent = true;
      const from = performance.now();
      await bench.until('the line closed by the node', () => open.closed, SILENCE_MS + 5 * SLACK_MS);
      const afterMs = open.closed.at - from;
      if (afterMs < SILENCE_MS - 10_000) throw new Broken(`it gave up after ${seconds(afterMs)}`);
    },
  },
  {
    promise: 'closed with 4001, since another took over, it waits 60 s',
    isSlow: true,
    look: async (bench) => {
      const open = await bench.welcomed();
      const from = performance.now();
      const before = bench.connections.length;
      open.socket.close(4001, 'another connection with this token took over; wait 60 s');
      const next = await bench.greeted(before);
      const afterMs = next.openedAt - from;
      if (afterMs < TAKEN_OVER_MS - SLACK_MS) throw new Broken(`it came back after ${seconds(afterMs)}`);
      await bench.welcomed();
    },
  },
];
