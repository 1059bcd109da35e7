import { afterAll, describe, expect, test, vi } from 'vitest';
import { Stage, TOKEN } from './conformance';

// they wait for leases to end most of the time, so several run beside each other
vi.setConfig({ maxConcurrency: 8 });

const stage = new Stage();
afterAll(() => stage.clear());

const run = (flaw: string, groups: string) =>
  stage.conformance(
    (url) => [process.execPath, 'tests/conformance/flawed-node.mjs', url, TOKEN, flaw],
    ['--quick', '--only', groups],
  );

describe.concurrent('a node that breaks a promise is found out', () => {
  test.each([
    ['speaks-first', 'greeting', 'it dials /field/v1 with its token, and says hello first'],
    ['coil-on-at-start', 'greeting', 'at power-up every coil is off, before the first command'],
    ['keeps-unnamed', 'commands', 'a relay that a command does not name is off'],
    ['lower-number', 'commands', 'a command of a lower number is ignored'],
    ['numbers-of-32-bits', 'commands', 'numbers are compared whole, beyond 32 bits'],
    ['any-boot', 'commands', 'a command for another boot is ignored'],
    ['any-seen', 'commands', 'a command that answers no relays frame of this connection is ignored'],
    ['no-lease', 'lease', 'without renewal every coil drops when the lease ends, and not before'],
    [
      'lease-from-arrival',
      'lease',
      'the lease counts from when it sent the frame, not from when the command came',
    ],
    ['no-trips', 'lease', 'the trip is counted, once'],
    ['loses-unacknowledged', 'readings', 'what was not acknowledged is sent again on the next connection'],
    ['oldest-first', 'readings', 'the newest of each point comes first'],
    ['no-back-off', 'line', 'a line that is lost is dialled again after 1 to 30 s'],
  ])('%s', { timeout: 200_000 }, async (flaw, group, promise) => {
    const outcome = await run(flaw, group);
    expect(outcome.broken.filter((line) => line.startsWith(promise))).toHaveLength(1);
    expect(outcome.code).toBe(1);
  });
});

test.concurrent('the same node without a flaw breaks none', { timeout: 200_000 }, async () => {
  const outcome = await run('none', 'greeting,commands,lease,readings,alone,line,restart');
  expect(outcome.broken).toEqual([]);
  expect(outcome.code).toBe(0);
});

test.each([
  ['nothing', [], 'npm run conformance -- URL TOKEN'],
  ['an address of pages', ['http://127.0.0.1:3000', 'x'], 'URL must be ws:// with a port'],
  ['a rate of nothing', ['ws://127.0.0.1:3000', 'x', '--rate', '0'], '--rate must be from 0.1 to 60'],
  ['an unknown group', ['ws://127.0.0.1:3000', 'x', '--only', 'speed'], '--only knows greeting, commands'],
])('given %s, it says how it is called', async (_what, given, sentence) => {
  const { code, said } = await stage.ended(['scripts/conformance.mjs', ...given]);
  expect(code).toBe(64);
  expect(said).toContain(sentence);
});
