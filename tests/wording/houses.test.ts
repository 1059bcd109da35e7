import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { coreTrendWords, type HouseFacts, housesSentence, oldWords, worstOf } from '@/lib/wording/houses';
import { plainText } from '@/lib/wording/phrase';

const house = (name: string, more: Partial<HouseFacts> = {}): HouseFacts => ({
  ...{ name, frostLimit: 3, coldest: 6, alarms: 0, lastLowest: 4.1, fallingCores: [], isLaidUp: false },
  ...more,
});
const said = (houses: HouseFacts[], ofHolding = 0) =>
  plainText(housesSentence(worstOf(houses), ofHolding, USUAL)).replaceAll('\u00a0', ' ');

describe('the sentence over all houses', () => {
  it('says that they hold, and how far down the coldest came', () => {
    expect(said([house('Long house'), house('Prop house', { lastLowest: 5 })])).toBe(
      'Both houses hold. No alarm stands, and the coldest came down to 4.1 °C last night.',
    );
  });

  it('names the one that asks first, and why', () => {
    expect(
      said([
        house('Long house'),
        house('Prop house', { alarms: 1, lastLowest: 1.2, fallingCores: ['Yew heap'] }),
      ]),
    ).toBe(
      'The prop house asks for you first: one open alarm, 1.2 °C at its lowest last night and a lasting fall of the yew heap’s core. The other house holds.',
    );
  });

  it('says that a house without a good reading asks for somebody too', () => {
    expect(said([house('Long house', { coldest: null, lastLowest: null })])).toContain(
      'no good reading of it now',
    );
  });

  it('asks nothing for a house that is laid up, and says that nobody controls it', () => {
    const old = house('Old house', { coldest: null, lastLowest: null, isLaidUp: true });
    expect(said([old, house('Long house')])).toBe(
      'The long house holds. No alarm stands, and the coldest came down to 4.1 °C last night. Nobody controls the old house: it is laid up.',
    );
    expect(said([old])).toBe('No house is in service. Nobody controls the old house: it is laid up.');
  });

  it('says what is of no single house before all', () => {
    expect(said([house('Long house')], 1)).toMatch(/^One alarm is of the holding as a whole\./);
  });

  it('says what is missing where there is none', () => expect(said([])).toBe('There is no house yet.'));
});

describe('the order of houses', () => {
  it('is alarms, then under the limit, then falling cores, then how near the limit is', () => {
    const order = worstOf([
      house('fine', { coldest: 9 }),
      house('near', { coldest: 3.5 }),
      house('falling', { fallingCores: ['heap'] }),
      house('was under', { lastLowest: 2 }),
      house('is under', { coldest: 2 }),
      house('alarm', { alarms: 2 }),
    ]).map(({ name }) => name);
    expect(order).toEqual(['alarm', 'is under', 'was under', 'falling', 'near', 'fine']);
  });
});

describe('a core in words', () => {
  it('tells its way, and a lasting fall as one', () => {
    const trend = { changeK: -3.2, days: 7, isLastingFall: true };
    expect(coreTrendWords(trend, USUAL)).toBe('3.2\u00a0°C lower than 7 days before, a lasting fall');
    expect(coreTrendWords({ ...trend, changeK: 0.2, isLastingFall: false }, USUAL)).toBe('as 7 days before');
    expect(coreTrendWords(null, USUAL)).toContain('no trend yet');
  });
});

describe('the age of a reading', () => {
  it('is told from a minute on', () => {
    expect(oldWords(0, 59_000)).toBeNull();
    expect(oldWords(0, 120_000)).toBe('2\u00a0min ago');
    expect(oldWords(null, 0)).toBe('nothing read yet');
  });
});
