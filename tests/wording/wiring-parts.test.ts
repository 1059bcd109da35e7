import { describe, expect, it } from 'vitest';
import { plainText, type Phrase } from '@/lib/wording/phrase';
import { circuitWords, contactFit, isMains, ratedWords, safeStateWords } from '@/lib/wording/wiring-load';
import { interlockSentence, loopSentence, tokenUse } from '@/lib/wording/wiring-parts';

const text = (phrases: Phrase[]) => plainText(phrases).replaceAll('\u00a0', ' ');
const fan = { kind: 'motor', watts: 12, volts: 24, supply: 'dc', contactAmps: 5 } as const;
const mat = { kind: 'heater', watts: 160, volts: 230, supply: 'ac', contactAmps: 10 } as const;

describe('a load', () => {
  it('has the safe state that its contact gives it', () => {
    expect(safeStateWords('NO', 'motor')).toBe('Stands still');
    expect(safeStateWords('NC', 'motor')).toBe('Runs');
    expect(safeStateWords('NC', 'heater')).toBe('Heats');
    expect(safeStateWords('NO', 'other')).toBe('Is off');
  });

  it('is rated in watts and amperes where both are told', () => {
    expect(ratedWords(fan).replaceAll('\u00a0', ' ')).toBe('12 W · 0.50 A');
    expect(ratedWords({ kind: 'motor', watts: 12 }).replaceAll('\u00a0', ' ')).toBe('12 W');
    expect(ratedWords({ kind: 'motor' })).toBe('not told');
  });

  it('names its circuit', () => {
    expect(
      [circuitWords(fan), circuitWords(mat), circuitWords({ kind: 'lamp' })].map((one) =>
        one.replaceAll('\u00a0', ' '),
      ),
    ).toEqual(['24 V DC', '230 V AC', 'not told']);
  });

  it('is mains above extra-low voltage', () => {
    expect([isMains(fan), isMains(mat), isMains({ kind: 'motor', volts: 60, supply: 'dc' })]).toEqual([
      false,
      true,
      false,
    ]);
  });

  it('is held against a contact that is derated for motors, and not for heaters', () => {
    expect(text(contactFit(fan)?.words ?? [])).toBe('0.50 A of 1.67 A (a third of the contact’s 5 A)');
    expect(text(contactFit(mat)?.words ?? [])).toBe('0.70 A of the contact’s 10 A');
    expect(contactFit({ ...fan, watts: 60 })?.isOver).toBe(true);
    expect(contactFit({ ...mat, watts: 2300 })?.isOver).toBe(false);
    expect(contactFit({ kind: 'motor', watts: 12 })).toBeNull();
  });
});

describe('interlocks, loops and tokens', () => {
  const words = { channel: 'Ridge vent', other: 'Gate-heap fan', delayS: 5, frostMayBreak: false };
  it('reads never-with both ways, with its wait and frost', () => {
    expect(text(interlockSentence({ ...words, kind: 'never-with' }))).toBe(
      'The ridge vent never runs with the gate-heap fan; after one is off the other waits 5 s. Not even frost breaks it.',
    );
  });
  it('reads needs', () => {
    expect(text(interlockSentence({ ...words, kind: 'needs', delayS: 0, frostMayBreak: true }))).toBe(
      'The ridge vent runs only while the gate-heap fan is on. Frost may break it.',
    );
  });
  it('reads a loop the way the air goes', () => {
    expect(
      text(
        loopSentence({
          channel: 'Gate-heap fan',
          source: 'Gate heap',
          intake: 'Loop intake',
          return: 'Loop return',
        }),
      ),
    ).toBe(
      'The gate-heap fan blows air in at the loop intake, through the gate heap, and back to the house past the loop return.',
    );
  });
  it('says where a token goes, by the kind of node', () => {
    expect(tokenUse('socket', 'https://example.org')[0]).toBe('wss://example.org/field/v1');
    expect(tokenUse('http', 'http://localhost:3000')[0]).toBe('POST http://localhost:3000/field/v1/readings');
  });
});
