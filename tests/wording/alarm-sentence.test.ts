import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { alarmSentence, type StandingAlarm } from '@/lib/wording/alarm-sentence';
import { plainText } from '@/lib/wording/phrase';
import type { Scene } from '@/lib/wording/scene';

const scene: Scene = {
  now: Date.parse('2026-12-01T05:45:00Z'),
  zone: 'Europe/London',
  preferences: USUAL,
  points: [{ key: 'bench-1', name: 'Bench probe 1', role: 'bench', unit: 'Cel' }],
  channels: [],
  sources: [],
};
const alarm = (kind: string, acknowledgedBy: string | null = null): StandingAlarm => ({
  ...{ kind, about: { point: 'bench-1' }, data: { value: 1.8 }, acknowledgedBy },
  raisedAt: scene.now - 60_000,
});
const said = (...standing: StandingAlarm[]) =>
  plainText(alarmSentence(standing, scene)).replaceAll('\u00a0', ' ');

describe('the sentence over alarms', () => {
  it('says in so many words that nothing is asked of anybody', () => {
    expect(said()).toBe('Nothing is asking for you.');
  });

  it('tells the gravest first, whichever came first', () => {
    expect(said(alarm('no-gain'), alarm('frost'))).toBe(
      'Two alarms stand. Frost near: the bench fell to 1.8 °C. Nobody has taken them on yet.',
    );
  });

  it('tells who has the only one', () => {
    expect(said(alarm('frost', 'grower@larkmoor.example'))).toContain('grower@larkmoor.example has it.');
  });

  it('tells how many still wait for somebody', () => {
    expect(said(alarm('frost', 'a'), alarm('node-lost'))).toContain('One of them waits for somebody.');
  });
});
