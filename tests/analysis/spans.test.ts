import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { channelSpans, type ChannelRecord, secondsOf, startsOf } from '@/lib/analysis/spans';
import { CLAIMS } from '@/lib/control/types';

const min = 60_000;
const nothing: ChannelRecord = {
  decisions: [],
  reports: [],
  trips: [],
  silences: [],
  stood: [],
  safe: 'off',
};
const kinds = (record: Partial<ChannelRecord>, to = 100 * min) =>
  channelSpans({ ...nothing, ...record }, 0, to).map((span) => [span.kind, span.from / min, span.to / min]);

describe('spans of a channel', () => {
  it('show a draw and the rest that follows it', () => {
    const decisions: ChannelRecord['decisions'] = [
      { at: 10 * min, state: 'on', claim: 'band' },
      { at: 50 * min, state: 'off', claim: 'rest' },
      { at: 80 * min, state: 'off', claim: 'idle' },
    ];
    expect(kinds({ decisions })).toEqual([
      ['off', 0, 10],
      ['run', 10, 50],
      ['rest', 50, 80],
      ['off', 80, 100],
    ]);
  });

  it('follow what the relay says, not what was wanted, once it says anything', () => {
    const decisions: ChannelRecord['decisions'] = [{ at: 10 * min, state: 'on', claim: 'band' }];
    const reports: ChannelRecord['reports'] = [
      { at: 0, state: 'off' },
      { at: 12 * min, state: 'on' },
    ];
    expect(kinds({ decisions, reports })).toEqual([
      ['off', 0, 10],
      ['off', 10, 12],
      ['run', 12, 100],
    ]);
  });

  it('end a run where its lease ran out', () => {
    const decisions: ChannelRecord['decisions'] = [{ at: 10 * min, state: 'on', claim: 'band' }];
    const trips: ChannelRecord['trips'] = [{ at: 40 * min, state: 'off' }];
    expect(kinds({ decisions, trips })).toEqual([
      ['off', 0, 10],
      ['run', 10, 40],
      ['off', 40, 100],
    ]);
  });

  it('show a lost node as held in the safe state, whatever its relay said last', () => {
    const record: Partial<ChannelRecord> = {
      decisions: [{ at: 0, state: 'on', claim: 'band' }],
      reports: [{ at: 0, state: 'on' }],
      silences: [{ from: 30 * min, to: 60 * min }],
    };
    expect(kinds(record)).toEqual([
      ['run', 0, 30],
      ['held', 30, 60],
      ['run', 60, 100],
    ]);
  });

  it('show what a lost node ran by its fallback, as it told later', () => {
    const record: Partial<ChannelRecord> = {
      decisions: [{ at: 0, state: 'off', claim: 'fail-safe' }],
      reports: [
        { at: 0, state: 'off' },
        { at: 80 * min, state: 'off' },
      ],
      trips: [
        { at: 20 * min, state: 'on' },
        { at: 40 * min, state: 'off' },
      ],
      silences: [{ from: 25 * min, to: 80 * min }],
    };
    expect(kinds(record)).toEqual([
      ['held', 0, 20],
      ['run', 20, 40],
      ['held', 40, 100],
    ]);
  });

  it('count no draw while its proof denies that a load ran', () => {
    const record: Partial<ChannelRecord> = {
      decisions: [{ at: 0, state: 'on', claim: 'band' }],
      reports: [{ at: 0, state: 'on' }],
      stood: [{ from: 30 * min, to: 60 * min }],
    };
    expect(kinds(record)).toEqual([
      ['run', 0, 30],
      ['held', 30, 60],
      ['run', 60, 100],
    ]);
    const spans = channelSpans({ ...nothing, ...record }, 0, 100 * min);
    expect(secondsOf(spans, (span) => span.on)).toBe(70 * 60);
  });

  it('count a load that runs without its coil as running while its node is lost', () => {
    const spans = channelSpans(
      { ...nothing, safe: 'on', silences: [{ from: 30 * min, to: null }] },
      0,
      100 * min,
    );
    expect(secondsOf(spans, (span) => span.on)).toBe(70 * 60);
  });

  it('outline what a person ordered, running or not', () => {
    const decisions: ChannelRecord['decisions'] = [
      { at: 0, state: 'on', claim: 'hand' },
      { at: 20 * min, state: 'off', claim: 'hand' },
    ];
    expect(channelSpans({ ...nothing, decisions }, 0, 40 * min).map((span) => [span.kind, span.on])).toEqual([
      ['hand', true],
      ['hand', false],
    ]);
  });

  it('count no start for a load that ran already at noon', () => {
    const decisions: ChannelRecord['decisions'] = [
      { at: -5 * min, state: 'on', claim: 'band' },
      { at: 20 * min, state: 'off', claim: 'idle' },
      { at: 30 * min, state: 'on', claim: 'frost' },
      { at: 35 * min, state: 'on', claim: 'band' },
    ];
    expect(startsOf(channelSpans({ ...nothing, decisions }, 0, 100 * min))).toBe(1);
  });

  it('fill their time exactly, neighbours different, however the record looks', () => {
    const at = fc.integer({ min: -1000, max: 7000 });
    const state = fc.constantFrom('on' as const, 'off' as const);
    const sorted = <T extends { at: number }>(row: fc.Arbitrary<T>) =>
      fc.array(row, { maxLength: 12 }).map((rows) => rows.sort((a, b) => a.at - b.at));
    const record = fc.record({
      decisions: sorted(fc.record({ at, state, claim: fc.constantFrom(...CLAIMS) })),
      reports: sorted(fc.record({ at, state })),
      trips: sorted(fc.record({ at, state })),
      silences: fc.constantFrom<ChannelRecord['silences'][]>(
        [],
        [
          { from: 500, to: 900 },
          { from: 2000, to: null },
        ],
      ),
      stood: fc.constantFrom<ChannelRecord['stood'][]>([], [{ from: 1000, to: 1500 }]),
      safe: state,
    });
    fc.assert(
      fc.property(record, (one) => {
        const spans = channelSpans(one, 0, 6000);
        expect(spans[0]?.from).toBe(0);
        expect(spans.at(-1)?.to).toBe(6000);
        for (const [i, span] of spans.entries()) {
          expect(span.to).toBeGreaterThan(span.from);
          const before = spans[i - 1];
          if (before === undefined) continue;
          expect(before.to).toBe(span.from);
          expect([before.kind, before.on, before.claim]).not.toEqual([span.kind, span.on, span.claim]);
        }
      }),
    );
  });
});
