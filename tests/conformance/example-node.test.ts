import { afterAll, expect, test, vi } from 'vitest';
import { Stage, TOKEN, type Outcome } from './conformance';

// they wait for leases to end most of the time, so they run beside each other
vi.setConfig({ testTimeout: 400_000 });

const stage = new Stage();
afterAll(() => stage.clear());

function example(name: string, options: string[]): Promise<Outcome> {
  const points = stage.file(`${name}-points.json`, { 'bench-1': 3.5, humidity: 81 });
  const settings = (server: string) =>
    stage.file(`${name}.json`, {
      ...{ server, token: TOKEN, node: 'EX-1', folder: `${name}-kept`, backend: 'dry-run' },
      ...{ dryRunPoints: points, relays: [{}, {}, {}] },
      points: [
        { key: 'bench-1', unit: 'Cel' },
        { key: 'humidity', unit: '%RH' },
      ],
    });
  const command = (url: string) => [process.execPath, 'examples/node/node.mjs', settings(url)];
  return stage.conformance(command, options);
}

test.concurrent('the example node keeps every promise of the field protocol', async () => {
  const outcome = await example('quick', ['--quick']);
  expect(outcome.broken).toEqual([]);
  expect(outcome.leftOut.map((line) => line.split(':')[1])).toEqual(Array(3).fill(' takes minutes'));
  expect(outcome.code).toBe(0);
  expect(outcome.kept.length).toBeGreaterThan(40);
});

test.concurrent(
  'it keeps those that take real time: 25 s of silence, and a take-over waited out',
  async () => {
    const outcome = await example('slow', ['--only', 'line']);
    expect(outcome.broken).toEqual([]);
    expect(outcome.leftOut).toEqual([]);
    expect(outcome.kept).toHaveLength(4);
  },
);
