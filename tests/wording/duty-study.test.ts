// What Duty says beside its figures: comparisons, recovery, the cold outdoors, and what must not be taken for more than it is.
import { describe, expect, it } from 'vitest';
import type { ComparedFigure, Comparison } from '@/lib/analysis/compare';
import type { NightSummary } from '@/lib/analysis/nights';
import type { PooledRecovery, RecoveryTrend, RecoveryWeek } from '@/lib/analysis/recovery';
import { summarise } from '@/lib/analysis/summarise';
import { USUAL } from '@/lib/units/preferences';
import { compareSentence, gapWords, meanWords, verdictWords } from '@/lib/wording/duty-compare';
import { nightNotes } from '@/lib/wording/duty-notes';
import { outdoorsWords } from '@/lib/wording/duty-outdoors';
import { effectWords, recoverySentence, tauWords, trendWords } from '@/lib/wording/duty-recovery';
import { plainText } from '@/lib/wording/phrase';
import { scene } from '../analysis/scene';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const mean = { mean: 4.2, sd: 0.3, sdWhole: 0.55, degrees: 6, nights: 7 };
const figure = (more: Partial<ComparedFigure> = {}): ComparedFigure => ({
  ...{ key: 'heat', chosen: mean, other: { ...mean, mean: 5 }, isBeyondChance: true },
  difference: { value: -0.8, low: -1.4, high: -0.2 },
  ...more,
});
const comparison = (...figures: ComparedFigure[]): Comparison => ({
  ...{ figures, isPaired: false },
  chosen: { nights: 7, leftOut: 0 },
  other: { nights: 7, leftOut: 0 },
});
const compared = (...figures: ComparedFigure[]) =>
  plainText(compareSentence(comparison(...figures), 'the gate heap', 'the nights of 3 to 9 Nov'));

describe('a comparison in words', () => {
  it('names what differs beyond chance and says of the rest that it is no more', () => {
    const chance = figure({ key: 'core', isBeyondChance: false });
    expect(compared(figure(), chance)).toBe(
      'Beside the nights of 3 to 9 Nov, the gate heap gave less heat, beyond chance. What else differs is no more than chance.',
    );
    expect(verdictWords(chance)).toBe('no more than chance');
  });

  it('says so where nothing does, and where nothing can be told', () => {
    expect(compared(figure({ isBeyondChance: false }))).toContain('nothing that chance alone would not do');
    const none = figure({ chosen: null, difference: null, isBeyondChance: null });
    expect(compared(none)).toContain('nothing can be told yet');
    expect(meanWords('heat', null, USUAL)).toBe('not known yet');
  });

  it('shows figures in their unit with what they are uncertain by', () => {
    expect(plain(meanWords('heat', mean, USUAL))).toBe('4.20 ± 0.55 kWh');
    expect(plain(meanWords('ran', { ...mean, mean: 0.162, sdWhole: 0.011 }, USUAL))).toBe('16.2 ± 1.1 %');
    expect(plain(gapWords('heat', { value: -0.8, low: -1.4, high: -0.2 }, USUAL))).toBe(
      '−0.80 kWh (−1.40 to −0.20)',
    );
  });

  it('shows a difference of temperatures in Fahrenheit without the offset of the scale', () => {
    const inF = { ...USUAL, temperature: 'F' as const };
    expect(plain(gapWords('core', { value: 10, low: 5, high: 15 }, inF))).toBe('+18.0 °F (9.0 to 27.0)');
    expect(plain(meanWords('core', { ...mean, mean: 50, sdWhole: 1 }, inF))).toBe('122.0 ± 1.8 °F');
  });
});

const recovery = (minutes: number, level: number): PooledRecovery => ({
  tau: { value: minutes * 60, sd: 60, low: (minutes - 2) * 60, high: (minutes + 2) * 60 },
  level: { value: level, sd: 0.3, low: level - 0.6, high: level + 0.6 },
  rests: 9,
});
const week = (name: string, of: PooledRecovery | null): RecoveryWeek => ({
  ...{ week: name, from: 0, to: 1, recovery: of, rests: 9 },
});
const weeks = [
  week('2026-10-26', recovery(30, 46.2)),
  week('2026-11-02', null),
  week('2026-11-23', recovery(75, 41.6)),
];
const trend = (change: RecoveryTrend['change']): RecoveryTrend => ({
  ...{ weeks: 5, change },
  ratioPerWeek: { value: 1.2, low: 1.1, high: 1.31 },
});

describe('recovery in words', () => {
  it('speaks of a change only where the trend’s interval leaves no doubt', () => {
    expect(plain(plainText(recoverySentence(weeks, trend('slower'), USUAL)))).toBe(
      'It is coming back more slowly: two thirds took 30 min in the first week and now take 1 h 15 min, towards 41.6 °C instead of 46.2 °C. Probe and squeeze it first; feed or turn it on a mild day, with the fan off.',
    );
    for (const change of ['none-seen', 'cannot-tell'] as const)
      expect(recoverySentence(weeks, trend(change), USUAL)).toEqual([]);
    expect(recoverySentence([], trend('slower'), USUAL)).toEqual([]);
  });

  it('tells the trend with its interval, the nearer end first', () => {
    expect(plain(trendWords(trend('slower')))).toContain('Slower by 20 % (10 to 31) from week to week');
    const quicker = { ...trend('quicker'), ratioPerWeek: { value: 0.9, low: 0.82, high: 0.97 } };
    expect(plain(trendWords(quicker))).toContain('Quicker by 10 % (3 to 18) from week to week');
    expect(trendWords({ ...trend('cannot-tell'), weeks: 1 })).toContain('there is one');
  });

  it('says at least where nothing bounds it above', () => {
    expect(plain(tauWords({ value: 1800, low: 1500, high: null }))).toBe('30.0 min (at least 25.0)');
  });

  it('tells what was done to it from chance', () => {
    const effect = {
      ...{ at: 0, kind: 'turned', nightsBefore: 6, nightsAfter: 7, p: 0.01, change: 'quicker' as const },
      tauRatio: { value: 0.8, low: 0.7, high: 0.9 },
      levelChange: { value: 2, low: 1, high: 3 },
    };
    expect(plain(effectWords(effect, USUAL))).toBe(
      'quicker: two thirds in 0.80 times the time (0.70 to 0.90), 2.0 °C higher',
    );
    expect(effectWords({ ...effect, change: 'none-seen' }, USUAL)).toContain('no change beyond chance');
    expect(effectWords({ ...effect, tauRatio: null, change: 'cannot-tell' }, USUAL)).toContain(
      'cannot be told',
    );
  });
});

describe('heat against outdoors in words', () => {
  it('says why there is no line', () => {
    expect(outdoorsWords({ why: 'few-nights' }, [], 'gate heap', USUAL)).toBe(
      'How much more heat a colder night brings is not known yet: under eight whole nights with a draw are known.',
    );
  });

  it('speaks in the reader’s degrees, and of no heat that chance would bring', () => {
    const line = { perColderK: { value: 0.36, low: 0.18, high: 0.54 }, scatterKWh: 0.4, curve: [] };
    const inF = { ...USUAL, temperature: 'F' as const };
    expect(plain(outdoorsWords(line, [], 'gate heap', inF))).toContain(
      'goes with 0.20 kWh (0.10 to 0.30) more',
    );
    const unsure = { ...line, perColderK: { value: 0.36, low: -0.1, high: 0.8 } };
    expect(outdoorsWords(unsure, [], 'gate heap', USUAL)).toContain('can be told from chance');
  });
});

describe('the notes under nights', () => {
  const night: NightSummary = { ...summarise(scene()), coverageLow: false };
  const assumed = { ...night, heat: { kWh: 2, sd: 0.3, assumedRunning: true } };
  const seen = { ...night, heat: { kWh: 2, sd: 0.3, assumedRunning: false } };

  it('say nothing of a night that was read and whose run was seen', () =>
    expect(nightNotes([seen])).toEqual([]));

  it('say of several that their sum is rounded once', () =>
    expect(nightNotes([seen, seen])).toEqual([expect.stringContaining('rounded once')]));

  it('say where the loop was hardly read while it ran, though the house was', () => {
    const part = { ...seen, coverageLow: true, coverage: 0.98, heatMeasured: 0.62 };
    expect(plain(nightNotes([part])[0] ?? '')).toContain('Only 62 % of the run was read at both ends');
    expect(plain(nightNotes([part, seen])[0] ?? '')).toContain('In one night under 90 % of the run was read');
  });

  it('say of how many nights too little was read, and of one how much', () => {
    const thin = { ...seen, coverageLow: true, coverage: 0.71 };
    expect(plain(nightNotes([thin, seen])[0] ?? '')).toContain('Under 90 % of one night was read');
    expect(plain(nightNotes([thin])[0] ?? '')).toContain('Only 71 % of this night was read');
  });

  it('say where heat supposes that the load ran', () => {
    expect(nightNotes([assumed, assumed])[0]).toContain('no run proof shows it');
    expect(nightNotes([assumed, seen])[0]).toMatch(/^One night: /);
  });
});
