import { describe, expect, it } from 'vitest';
import { aloneTimes, type AloneLoad } from '@/lib/analysis/alone';

/** Minutes from the night's noon. */
const at = (minutes: number) => minutes * 60_000;
const fan = (...switchings: [number, 'on' | 'off'][]): AloneLoad => ({
  ...{ label: 'Gate-heap fan', node: 'LH-1' },
  switchings: switchings.map(([minutes, state]) => ({ at: at(minutes), state })),
});
const told = (from: number, to: number | null, node = 'LH-1') => ({
  node,
  from: at(from),
  to: to === null ? null : at(to),
});
const NOW = at(1200);

describe('What a node did by itself', () => {
  it('is the time that its log tells, with each load’s seconds in it', () => {
    const times = aloneTimes(
      [told(850, 940)],
      [fan([850, 'on'], [870, 'off'], [910, 'on'], [930, 'off'])],
      0,
      NOW,
    );
    expect(times).toEqual([{ ...told(850, 940), ran: [{ label: 'Gate-heap fan', seconds: 2400 }] }]);
  });

  it('ends a run with the command that went on with it', () => {
    expect(aloneTimes([told(850, 940)], [fan([930, 'on'])], 0, NOW)[0]?.ran).toEqual([
      { label: 'Gate-heap fan', seconds: 600 },
    ]);
  });

  it('is told where nothing ran, unless it was as short as a restart', () => {
    expect(aloneTimes([told(850, 940)], [fan()], 0, NOW)).toEqual([{ ...told(850, 940), ran: [] }]);
    expect(aloneTimes([told(850, 850.5)], [fan()], 0, NOW)).toEqual([]);
    expect(aloneTimes([told(850, 850.5)], [fan([850, 'on'], [850.4, 'off'])], 0, NOW)).toHaveLength(1);
  });

  it('of one that logs nothing is from its first run to its last', () => {
    const times = aloneTimes([], [fan([850, 'on'], [870, 'off'], [910, 'on'], [930, 'off'])], 0, NOW);
    expect(times).toEqual([{ ...told(850, 930), ran: [{ label: 'Gate-heap fan', seconds: 2400 }] }]);
  });

  it('of another node is its own', () => {
    const times = aloneTimes([told(850, 940, 'PH-1')], [fan([860, 'on'], [870, 'off'])], 0, NOW);
    expect(times.map(({ node, ran }) => [node, ran.length])).toEqual([
      ['PH-1', 0],
      ['LH-1', 1],
    ]);
  });

  it('before the time asked for is left out, and what goes on is not over', () => {
    const times = aloneTimes([told(-90, -10), told(1190, null)], [fan([1195, 'on'])], 0, NOW);
    expect(times).toEqual([{ ...told(1190, null), ran: [{ label: 'Gate-heap fan', seconds: 300 }] }]);
  });
});
