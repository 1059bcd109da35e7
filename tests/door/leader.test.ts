import { expect, it } from 'vitest';
import { LeaderWatch, parseHealth, type Health } from '@/worker/door/leader';
import { systemClock } from '@/worker/door/clock';

function watching(answers: Record<number, Health | null>) {
  const changes: number[] = [];
  const watch = new LeaderWatch(
    Object.keys(answers).map(Number),
    systemClock,
    (port) => Promise.resolve(answers[port] ?? null),
    (port) => changes.push(port),
  );
  return { watch, changes };
}

it('follows the newest epoch, not the first to say that it leads', async () => {
  const { watch } = watching({ 1: { leader: true, epoch: 4 }, 2: { leader: true, epoch: 5 } });
  await watch.look();
  expect(watch.port).toBe(2);
});

it('keeps the last leader while nobody else leads', async () => {
  const answers: Record<number, Health | null> = { 1: { leader: true, epoch: 4 }, 2: null };
  const { watch, changes } = watching(answers);
  await watch.look();
  answers[1] = null;
  await watch.look();
  answers[1] = { leader: false, epoch: 4 };
  await watch.look();
  expect(watch.port).toBe(1);
  expect(changes).toEqual([1]);
});

it('does not go back to a former leader that still thinks it leads', async () => {
  const answers: Record<number, Health | null> = { 1: { leader: true, epoch: 4 }, 2: null };
  const { watch, changes } = watching(answers);
  await watch.look();
  answers[2] = { leader: true, epoch: 5 };
  await watch.look();
  answers[2] = null;
  await watch.look();
  expect(watch.port).toBe(2);
  expect(changes).toEqual([1, 2]);
});

it('knows no leader before one has led', async () => {
  const { watch } = watching({ 1: { leader: false, epoch: 3 }, 2: null });
  await watch.look();
  expect(watch.port).toBeNull();
});

it.each(['', 'null', '[]', '{"leader":"yes","epoch":1}', '{"epoch":1}', '<html>'])(
  'takes %j for no health',
  (text) => {
    expect(parseHealth(text)).toBeNull();
  },
);

it('takes a worker that never led for one without an epoch', () => {
  expect(parseHealth('{"leader":false,"epoch":null}')).toEqual({ leader: false, epoch: -1 });
});
