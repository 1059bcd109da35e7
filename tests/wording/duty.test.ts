import { describe, expect, it } from 'vitest';
import type { NightSummary } from '@/lib/analysis/nights';
import { summarise } from '@/lib/analysis/summarise';
import { totalOf } from '@/lib/analysis/totals';
import { USUAL } from '@/lib/units/preferences';
import { decisionWords, dutySentence, nightTitle } from '@/lib/wording/duty';
import { plainText } from '@/lib/wording/phrase';
import { scene } from '../analysis/scene';

const one = summarise(scene());
const day = 86_400_000;
const many = (count: number, change: (i: number) => Partial<NightSummary> = () => ({})): NightSummary[] =>
  Array.from({ length: count }, (_, i) => ({
    ...one,
    night: `2026-11-${String(i + 1).padStart(2, '0')}`,
    from: one.from + i * day,
    belowFrostLimitSeconds: 0,
    coreAtDawn: { value: 52 - i * 0.5, at: one.from + 20 * 3_600_000 + i * day },
    ...change(i),
  }));
const said = (nights: NightSummary[], preferences = USUAL, frostLimitC: number | null = 3) =>
  plainText(
    dutySentence({ source: 'Gate heap', nights, totals: totalOf(nights), frostLimitC }, preferences),
  ).replaceAll('\u00a0', ' ');

describe('the sentence over Duty', () => {
  it('tells run, heat and fan power as the table under it sums them, rounded once', () => {
    const nights = many(10, () => ({
      heat: { kWh: 4.04, sd: 0.5, assumedRunning: false },
      electricity: { kWh: 0.04 },
      heatElectricity: { kWh: 0.04 },
    }));
    expect(said(nights)).toContain(
      'Over 10 nights the gate heap ran 6 % of the time and moved 40.4 ± 5.0 kWh of heat on 0.400 kWh of fan power: 101 kWh of heat for 1 kWh of fan.',
    );
  });

  it('tells how the core went from the first dawn to the last, over a week at least', () => {
    expect(said(many(10))).toContain('The core stands at 47.5 °C at dawn, 4.5 °C lower than on 1 Nov.');
    expect(said(many(5))).not.toContain('core');
  });

  it('tells time under the frost limit with the lowest value and its night', () => {
    const nights = many(3, (i) => ({ belowFrostLimitSeconds: i === 1 ? 720 : 0 }));
    expect(said(nights)).toContain(
      'The house stood under its frost limit of 3.0 °C for 12 min in one of them, lowest at 2.5 °C in the night of 1 to 2 November.',
    );
  });

  it('says that nothing ran rather than nought per cent', () => {
    const nights = many(2, () => ({ onSeconds: 0 }));
    expect(said(nights)).toContain('Over 2 nights the gate heap did not run.');
  });

  it('says why heat is not known where it is not', () => {
    const nights = many(2, () => ({ heat: null, missing: { heat: 'no-flow' } }));
    expect(said(nights)).toContain(
      'How much heat it moved is not known: no air flow is entered for its fan.',
    );
  });

  it('says that heat went out of the house where it did', () => {
    const nights = many(2, () => ({ heat: { kWh: -1, sd: 0.2, assumedRunning: false } }));
    expect(said(nights)).toContain('took 2.0 ± 0.4 kWh of heat out of the house');
  });

  it('says how many nights could not be measured', () => {
    const nights = many(4, (i) => (i === 0 ? { heat: null } : {}));
    expect(said(nights)).toContain('One night could not be measured.');
  });

  it('speaks of this night so far while it lasts', () => {
    expect(said([{ ...one, complete: false }])).toContain('This night so far the gate heap ran');
  });

  it('says what is missing where no night is kept', () => {
    expect(said([])).toContain('No night of the gate heap is kept yet.');
  });

  it('reads in the reader’s degrees', () => {
    expect(said(many(10), { ...USUAL, temperature: 'F' })).toContain('117.5 °F at dawn, 8.1 °F lower');
  });
});

describe('words of a night', () => {
  it('name a night by both its dates', () => {
    expect(nightTitle('2026-11-26')).toBe('26 to 27 November');
    expect(nightTitle('2026-11-30')).toBe('30 November to 1 December');
  });

  it('tell a decision with what decided it', () => {
    expect(decisionWords('off', 'rest')).toBe('off: the source rests');
    expect(decisionWords('on', 'frost')).toBe('on: help against frost');
  });
});
