import { describe, expect, it } from 'vitest';
import { ReadingRate, startsOf, withUnknown } from '@/worker/control/node-told';

const NO_POINT = 'this node has no point of that name';

describe('the starts of a node', () => {
  it('are counted from the second on, and a reconnect is none', () => {
    let kept: Record<string, unknown> = {};
    const counts = ['a', 'a', 'b', 'b', 7].map((boot, at) => {
      kept = { ...kept, ...startsOf(kept, boot, at), boot };
      return kept['restarts'];
    });
    expect(counts).toEqual([0, 0, 1, 1, 2]);
    expect(kept['bootAt']).toBe(4);
  });
});

describe('names without a point', () => {
  const refused = (index: number, name: string, why = NO_POINT) => ({ index, name, why });

  it('are kept with the unit they came in, the newest first, each once', () => {
    const first = withUnknown({}, [refused(0, 'bench-9')], [{ n: 'bench-9', u: 'Cel', v: 4 }], 1);
    const pack = [{ bu: '%RH' }, { n: 'rh', v: 80 }, { n: 'bench-9', u: 'Far', v: 40 }];
    const { unknown } = withUnknown({ ...first }, [refused(1, 'rh'), refused(2, 'bench-9')], pack, 2);
    expect(unknown).toEqual([
      { name: 'rh', unit: '%RH', at: 2 },
      { name: 'bench-9', unit: 'Far', at: 2 },
    ]);
  });

  it('are not those that were refused for another reason, and at most forty', () => {
    expect(withUnknown({}, [refused(0, 'bench-1', 'its time is before 1970')], [{}], 1).unknown).toEqual([]);
    const many = Array.from({ length: 90 }, (_, index) => refused(index, `t-${index}`));
    expect(withUnknown({}, many, [], 1).unknown).toHaveLength(40);
  });

  it('are forgotten a day after they were last sent', () => {
    const kept = { ...withUnknown({}, [refused(0, 'old')], [{ n: 'old' }], 0) };
    const fresh = withUnknown(kept, [refused(0, 'new')], [{ n: 'new' }], 86_400_001);
    expect(fresh.unknown.map(({ name }) => name)).toEqual(['new']);
  });

  it('of a row that somebody else wrote are read with care', () => {
    expect(withUnknown({ unknown: [null, { name: 3 }, { name: 'a', at: 1 }] }, [], [], 2).unknown).toEqual([
      { name: 'a', unit: null, at: 1 },
    ]);
  });
});

describe('readings a minute', () => {
  const minute = 60_000;

  it('are not known in the first minute', () => {
    const rate = new ReadingRate(0);
    rate.add(14, 30_000);
    expect(rate.perMinute(59_999)).toBeNull();
  });

  it('are counted over five minutes: fourteen each half minute are 28', () => {
    const rate = new ReadingRate(0);
    for (let at = 30_000; at <= 10 * minute; at += 30_000) rate.add(14, at);
    expect(rate.perMinute(10 * minute)).toBe(28);
  });

  it('fall to nothing when nothing comes', () => {
    const rate = new ReadingRate(0);
    rate.add(14, minute);
    expect(rate.perMinute(7 * minute)).toBe(0);
  });
});
