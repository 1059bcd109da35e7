import path from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { Stage, TOKEN } from './conformance';

let stage: Stage;
beforeEach(() => {
  stage = new Stage();
});
afterEach(() => stage.clear());

test('a node of the simulated yard keeps the same promises', { timeout: 300_000 }, async () => {
  const config = stage.file('yard.json', {
    ...{ seed: 7, stateFile: path.join(stage.folder, 'world.json') },
    nodes: [{ key: 'LH-1', token: TOKEN, house: 'long-house' }],
  });
  const outcome = await stage.conformance(
    (url) => [
      ...[process.execPath, '--import', 'tsx', 'worker/yard/main.ts'],
      ...['--config', config, '--server', url, '--rate', '10'],
    ],
    ['--quick'],
  );
  expect(outcome.broken).toEqual([]);
  // what takes minutes is held to by tests/yard with a clock that is moved on
  expect(outcome.leftOut.map((line) => line.split(':')[1])).toEqual(Array(3).fill(' takes minutes'));
  expect(outcome.code).toBe(0);
});
