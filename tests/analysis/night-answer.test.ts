import { expect, it } from 'vitest';
import { nightAnswer } from '@/lib/analysis/night-answer';
import { summarise } from '@/lib/analysis/summarise';
import { NightList } from '@/lib/schema/night';
import { chance } from './chance';
import { restScene, start, usual } from './rest-scene';
import { night, scene } from './scene';

/** The scene's night with a base that comes back after a draw that ended at ten in the evening. */
function recovered() {
  const rest = restScene(usual, chance(9));
  const input = scene();
  const [fan] = input.channels;
  if (fan === undefined) throw new Error('the scene has a fan');
  fan.record.decisions = [
    { at: start - 2_400_000, state: 'on', claim: 'band' },
    { at: start, state: 'off', claim: 'rest' },
    { at: start + usual.lengthS * 1000, state: 'on', claim: 'band' },
    { at: start + usual.lengthS * 1000 + 600_000, state: 'off', claim: 'rest' },
  ];
  const points = new Map(input.points).set('gate-base', rest.base).set('gate-core', rest.core);
  return summarise({ ...input, source: { ...input.source, base: 'gate-base' }, points });
}

it('a night tells outside programs how the heap comes back, and no more than was agreed', () => {
  expect(start).toBeGreaterThan(night.from);
  const answer = nightAnswer(recovered(), 'Europe/London');
  expect(Object.keys(answer.recovery ?? {})).toEqual(['tau', 'tauSd', 'level', 'rests']);
  expect(Math.abs((answer.recovery?.tau ?? 0) / usual.tauS - 1)).toBeLessThan(0.1);
  expect(answer.recovery?.rests).toBe(1);
  expect(Object.keys(answer.heat ?? {})).toEqual(['kWh', 'sd']);
  // its schema refuses keys that it does not know
  expect(NightList.parse({ items: [answer], next: null }).items).toEqual([answer]);
});

it('a night without a base point says that it has none, one without a draw that it had no rest', () => {
  const input = scene();
  expect(summarise(input).missing.recovery).toBe('no-base');
  const still = { ...input, source: { ...input.source, base: 'gate-core' }, channels: [] };
  expect(summarise(still)).toMatchObject({ recovery: null, rests: [], missing: { recovery: 'no-rest' } });
});
