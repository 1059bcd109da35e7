import { describe, expect, test, vi } from 'vitest';
import { OnceMore } from '@/worker/once-more';

/** Work whose runs are ended by hand. */
function byHand() {
  const ends: ((error?: Error) => void)[] = [];
  const work = new OnceMore(
    () =>
      new Promise((resolve, reject) => {
        ends.push((error) => (error === undefined ? resolve() : reject(error)));
      }),
  );
  return { work, ends };
}

describe('Work of which only the last run counts', () => {
  test('is run once more for all who asked while it ran, and only after it', async () => {
    const { work, ends } = byHand();
    const first = work.run();
    const [second, third] = [work.run(), work.run()];
    expect(ends).toHaveLength(1);

    ends[0]?.();
    await first;
    await vi.waitFor(() => expect(ends).toHaveLength(2));
    expect(work.idle).toBe(false);

    ends[1]?.();
    await Promise.all([second, third]);
    expect(ends).toHaveLength(2);
    expect(work.idle).toBe(true);
  });

  test('fails for who asked, and runs for who asked meanwhile', async () => {
    const { work, ends } = byHand();
    const first = work.run();
    const second = work.run();
    ends[0]?.(new Error('the database is away'));
    await expect(first).rejects.toThrow('the database is away');
    await vi.waitFor(() => expect(ends).toHaveLength(2));
    ends[1]?.();
    await expect(second).resolves.toBeUndefined();
    expect(work.idle).toBe(true);
  });

  test('is not idle between a run and the one that waits for its end', async () => {
    const { work, ends } = byHand();
    const idle: boolean[] = [];
    const first = work.run().then(() => idle.push(work.idle));
    const second = work.run();
    ends[0]?.();
    await first;
    expect(idle).toEqual([false]);
    await vi.waitFor(() => expect(ends).toHaveLength(2));
    ends[1]?.();
    await second;
  });
});
