import { randomUUID } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { afterAll, beforeEach, describe, expect, it } from 'vitest';
import { closePools, everyHolding } from '@/db/client';
import { appTime, ClockRateError, keepClockAnchor } from '@/db/queries/clock';
import { raiseEpoch, readLeader, releaseLead, renewLead, takeLead } from '@/db/queries/leader';

afterAll(closePools);

const [one, other] = [randomUUID(), randomUUID()];
const db = everyHolding();
const runOut = () => db.execute(sql`update leader set until = now() - interval '1 second'`);

describe('The lead', () => {
  beforeEach(() => db.execute(sql`delete from leader`));

  it('is one worker’s while its lease lasts, and the next one’s with the next epoch when it has run out', async () => {
    expect(await takeLead(db, one)).toMatchObject({ epoch: 1, formerHeartbeatAt: null });
    expect(await takeLead(db, other)).toBeNull();
    await runOut();
    expect(await takeLead(db, other)).toMatchObject({ epoch: 2, wasReleased: false });
    expect(await renewLead(db, one, 1, null)).toBe(false);
  });

  it('goes to one of two who ask at once', async () => {
    await takeLead(db, one);
    await runOut();
    const asked = await Promise.all(Array.from({ length: 8 }, () => takeLead(db, randomUUID())));
    expect(asked.filter((lead) => lead !== null)).toHaveLength(1);
  });

  it('is taken up at once by the same worker restarted, with the next epoch', async () => {
    await takeLead(db, one);
    expect(await takeLead(db, one)).toMatchObject({ epoch: 2 });
  });

  it('that ran out is renewed while nobody else took it', async () => {
    await takeLead(db, one);
    await runOut();
    expect(await renewLead(db, one, 1, Date.UTC(2026, 0, 1))).toBe(true);
    expect(await readLeader(db)).toMatchObject({ holder: one, lastStep: Date.UTC(2026, 0, 1) });
  });

  it('that was given back is free at once, and says that it was', async () => {
    await takeLead(db, one);
    await releaseLead(db, one, 1);
    expect(await takeLead(db, other)).toMatchObject({ epoch: 2, wasReleased: true });
  });

  it('is lifted to a later epoch by its holder only', async () => {
    await takeLead(db, one);
    expect(await raiseEpoch(db, other, 1, 9)).toBe(false);
    expect(await raiseEpoch(db, one, 1, 9)).toBe(true);
    expect(await renewLead(db, one, 9, null)).toBe(true);
  });
});

describe('The clock anchor', () => {
  it('is made once; another rate is refused by the name of its variable', async () => {
    const made = await keepClockAnchor(db, 60, 1_000_000, 5_000_000);
    expect(await keepClockAnchor(db, 60, 2_000_000)).toEqual(made);
    expect(appTime(made, 1_001_000)).toBe(5_060_000);
    await expect(keepClockAnchor(db, 1, 2_000_000)).rejects.toThrow(ClockRateError);
    await expect(keepClockAnchor(db, 1, 2_000_000)).rejects.toThrow('CLOCK_RATE is 1');
  });
});
