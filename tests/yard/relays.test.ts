import { describe, expect, test } from 'vitest';
import fc from 'fast-check';
import { RelayBoard } from '@/worker/yard/relays';

const leaseMs = 30_000;

/** What may befall a board: time, reports, reconnects, and commands right and wrong in every way. */
const happening = fc.oneof(
  fc.record({ what: fc.constant('time' as const), ms: fc.integer({ min: 1, max: 40_000 }) }),
  fc.record({ what: fc.constant('report' as const) }),
  fc.record({ what: fc.constant('reconnect' as const) }),
  fc.record({
    what: fc.constant('command' as const),
    ahead: fc.integer({ min: -3, max: 3 }),
    back: fc.integer({ min: 0, max: 5 }),
    isForeign: fc.boolean(),
    lease: fc.constantFrom(1, 30, 86_400),
    first: fc.constantFrom('on' as const, 'off' as const),
    second: fc.constantFrom('on' as const, 'off' as const),
  }),
);

describe('a relay board, whatever befalls it', () => {
  test('has no coil on later than 30 s after it sent the report that its last command answered', () => {
    fc.assert(
      fc.property(fc.array(happening, { maxLength: 80 }), (happenings) => {
        const board = new RelayBoard(2, 'b', 1);
        const sent: Array<{ seq: number; ms: number; line: number }> = [];
        let now = 0;
        let seq = 0;
        let line = 0;
        let number = 5;
        let answeredMs = Number.NEGATIVE_INFINITY;
        for (const event of happenings) {
          if (event.what === 'time') now += event.ms;
          if (event.what === 'report') {
            seq += 1;
            board.sent(seq, now);
            sent.push({ seq, ms: now, line });
          }
          if (event.what === 'reconnect') {
            line += 1;
            board.connected();
          }
          board.expire(now);
          if (event.what === 'command') {
            const frame = sent.at(-1 - event.back);
            const before = board.state().number;
            const answer = board.command(
              {
                type: 'command',
                number: Math.max(0, number + event.ahead),
                lease: event.lease,
                boot: event.isForeign ? 'other' : 'b',
                seen: frame?.seq ?? 999,
                channels: { '1': event.first, '2': event.second },
              },
              now,
            );
            if (answer.taken) {
              expect(event.isForeign).toBe(false);
              expect(frame?.line).toBe(line);
              expect(number + event.ahead).toBeGreaterThanOrEqual(before);
              expect(board.state().channels).toEqual({ '1': event.first, '2': event.second });
              answeredMs = Math.max(answeredMs, frame?.ms ?? answeredMs);
              number = Math.max(number, number + event.ahead);
            } else {
              expect(board.state().number).toBe(before);
            }
          }
          if (Object.values(board.state().channels).includes('on')) {
            expect(now).toBeLessThan(answeredMs + leaseMs);
          }
        }
      }),
      { numRuns: 2_000 },
    );
  });

  test('counts a trip each time that a coil drops by its lease, and only then', () => {
    const board = new RelayBoard(1, 'b', 1);
    const command = (number: number, seen: number, coil: 'on' | 'off', now: number): void => {
      board.sent(seen, now);
      board.command({ type: 'command', number, lease: 30, boot: 'b', seen, channels: { '1': coil } }, now);
    };
    command(1, 1, 'on', 0);
    expect(board.expire(29_999)).toBe(false);
    expect(board.expire(30_000)).toBe(true);
    expect(board.expire(99_000)).toBe(false);
    command(2, 2, 'off', 100_000);
    expect(board.expire(200_000)).toBe(false);
    expect(board.state().trips).toBe(1);
  });
});
