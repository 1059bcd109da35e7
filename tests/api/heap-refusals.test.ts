// What a heap book does not take, each refused at its field with what to give instead.
import { beforeAll, expect, it } from 'vitest';
import type { Asker } from './asker';
import { errorsOf, newHolding, personOf, type Json } from './asker';
import * as shown from './shown';

let owner: Asker;
const at = '/houses/long-house';
beforeAll(async () => {
  const holding = await newHolding('larkmoor');
  owner = await personOf(holding, 'owner', 'owner@larkmoor.example');
  await owner.make('/houses', shown.house);
  await owner.make(`${at}/sources`, { name: 'Gate heap', kind: 'heap' });
  await owner.make(`${at}/sources`, { name: 'Ground tubes', kind: 'ground' });
});

const entry = { source: 'gate-heap', kind: 'note', text: 'x' };
const refused: [string, string, Json, string][] = [
  ['an entry of what is still to come', 'heap-entries', { ...entry, at: '2199-01-01T00:00:00Z' }, 'at'],
  ['a round of what is still to come', 'probe-sets', { ...shown.round, at: '2199-01-01T00:00:00Z' }, 'at'],
  ['an entry of what is no heap', 'heap-entries', { ...entry, source: 'ground-tubes' }, 'source'],
  ['a round in what is no heap', 'probe-sets', { ...shown.round, source: 'ground-tubes' }, 'source'],
  ['words that turn the writing', 'heap-entries', { ...entry, text: 'dry \u202e yrd' }, 'text'],
  ['an id of its own make', 'heap-entries', { ...entry, id: '1' }, 'id'],
  [
    'a finding set aside that there is not',
    'heap-dismissals',
    { source: 'gate-heap', kind: 'haunted', mark: 'x', level: 1, why: 'seen' },
    'kind',
  ],
];
it.each(refused)('%s is refused', async (_what, list, body, path) => {
  const told = await owner.ask('POST', `${at}/${list}`, body);
  expect(told.status).toBe(422);
  expect(errorsOf(told)).toEqual([{ path, message: expect.stringMatching(/^[A-Z].*\.$/) }]);
});

it('a phone whose clock is a little ahead is believed', async () => {
  const soon = new Date(Date.now() + 120_000).toISOString();
  expect((await owner.ask('POST', `${at}/heap-entries`, { ...entry, at: soon })).status).toBe(201);
});
