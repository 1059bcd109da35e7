// 24 h without a line, which pass in two minutes: a node that keeps them, one that keeps half, and one that cannot be looked at so.
import { afterAll, expect, test, vi } from 'vitest';
import { Stage, TOKEN } from './conformance';

// a day of it is waiting, so they wait beside each other
vi.setConfig({ testTimeout: 400_000 });

const stage = new Stage();
afterAll(() => stage.clear());

const PROMISE = 'what was measured in 24 h without a line is kept, and comes when there is one';
const flawed = (flaw: string) =>
  stage.conformance(
    (url) => [process.execPath, 'tests/conformance/flawed-node.mjs', url, TOKEN, flaw],
    ['--only', 'day'],
  );

test.concurrent('the example node keeps the readings of a day', async () => {
  const points = stage.file('points.json', { 'bench-1': 3.5, humidity: 81 });
  const settings = (server: string) =>
    stage.file('settings.json', {
      ...{ server, token: TOKEN, node: 'EX-1', folder: 'day-kept', backend: 'dry-run' },
      ...{ dryRunPoints: points, relays: [{}] },
      points: [
        { key: 'bench-1', unit: 'Cel' },
        { key: 'humidity', unit: '%RH' },
      ],
    });
  const outcome = await stage.conformance(
    (url) => [process.execPath, 'examples/node/node.mjs', settings(url)],
    ['--only', 'day'],
  );
  expect(outcome).toMatchObject({ kept: [PROMISE], broken: [], leftOut: [], code: 0 });
});

test.concurrent('one that keeps twelve hours is found out', async () => {
  const outcome = await flawed('keeps-12-hours');
  expect(outcome.broken).toEqual([
    expect.stringMatching(
      /^what was measured in 24 h .*: of 2\d\.?\d* h .* bench-1 has a hole of 1\d\.?\d* h, to 1\d\.?\d* h before its end$/,
    ),
  ]);
  expect(outcome.code).toBe(1);
});

test.concurrent(
  'of one whose stamps do not follow the rate it is said that nothing was checked, and why',
  async () => {
    const outcome = await flawed('own-clock');
    expect(outcome.leftOut).toEqual([
      `${PROMISE}: not checked: its stamps do not follow a welcome of rate 720, so a day would take a day`,
    ]);
    expect(outcome).toMatchObject({ kept: [], broken: [], code: 0 });
  },
);
