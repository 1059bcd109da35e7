import { describe, expect, it } from 'vitest';
import { ALARM_KINDS } from '@/lib/schema/alarm';
import { alarmWords, byGravity, type AlarmFacts } from '@/lib/wording/alarm';
import { american, at, scene, spaced } from './scene';

const alarm = (kind: string, more: Partial<AlarmFacts> = {}): AlarmFacts => ({
  ...{ kind, about: {}, data: {}, raisedAt: at('05:33') },
  ...more,
});
const title = (one: AlarmFacts, to = scene) => spaced(alarmWords(one, to).title);

describe('an alarm', () => {
  it.each(ALARM_KINDS)('%s says what is wrong, what it means and what to do', (kind) => {
    const words = alarmWords(alarm(kind), scene);
    expect([words.title, words.effect, words.remedy].every((part) => /^[A-Z].{12,}/.test(part))).toBe(true);
    expect(words.effect).not.toBe('Something wants looking at.');
  });
  it('of frost names the sensor and how cold it is, in the reader’s degrees', () => {
    const frost = alarm('frost', { about: { point: 'bench-1' }, data: { value: 1.9 } });
    expect(title(frost)).toBe('Frost near: bench probe 1 fell to 1.9 °C');
    expect(title(frost, american)).toBe('Frost near: bench probe 1 fell to 35.4 °F');
  });
  it('of a silent point says since when', () =>
    expect(title(alarm('point-silent', { about: { point: 'bench-3' }, data: { lastAt: at('05:31') } }))).toBe(
      'Bench probe 3 has sent nothing since 05:31',
    ));
  it('of a lost node reads its time off the wire too', () =>
    expect(
      title(alarm('node-lost', { about: { node: 'LH-1' }, data: { lastHeardAt: '2026-11-27T05:20:00Z' } })),
    ).toBe('Node LH-1 has not been heard since 05:20'));
  it('of a kind that a later release made is still shown', () =>
    expect(title(alarm('gas-near'))).toBe('Gas near'));
});

it('control and frost come first, then what is grave, then what can wait; of equals the newest', () =>
  expect(
    byGravity([
      alarm('point-silent'),
      alarm('point-not-trusted', { raisedAt: at('05:40') }),
      alarm('node-lost'),
      alarm('frost'),
      alarm('control-not-running'),
    ]).map((one) => one.kind),
  ).toEqual(['control-not-running', 'frost', 'node-lost', 'point-not-trusted', 'point-silent']));
