// Guessing passwords: ten tries a minute by address and by account, and nobody else is held up by it.
import { beforeAll, expect, test } from 'vitest';
import { countTry } from '@/lib/server/limits';
import { Problem } from '@/lib/server/errors';
import { newHolding, PASSWORD, personOf, tryToSignIn } from '../api/asker';

beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  for (const name of ['one', 'two', 'three']) await personOf(larkmoor, 'grower', `${name}@larkmoor.example`);
});
const guess = (name: string, from: string) =>
  tryToSignIn(`${name}@larkmoor.example`, 'a wrong guess, and long', from);

test('the eleventh try of a minute from one address is refused, whoever it is for', async () => {
  for (let count = 0; count < 10; count += 1)
    expect((await guess(`guess-${count}`, '10.1.1.1')).status).toBe(401);
  const eleventh = await tryToSignIn('two@larkmoor.example', PASSWORD, '10.1.1.1');
  expect(eleventh.status).toBe(429);
  expect(Number(eleventh.headers.get('retry-after'))).toBeGreaterThan(0);
  expect((await tryToSignIn('two@larkmoor.example', PASSWORD, '10.1.1.2')).status).toBe(200);
});

test('changing the address does not help against one account, nor its spelling', async () => {
  // its own sign-in was the first of the ten
  for (let count = 0; count < 8; count += 1) await guess('three', `10.2.0.${count}`);
  expect((await guess('Three', '10.2.0.9')).status).toBe(401);
  expect((await guess('THREE', '10.2.0.10')).status).toBe(429);
  expect((await tryToSignIn('one@larkmoor.example', PASSWORD, '10.2.0.11')).status).toBe(200);
});

test('after a minute the tries are forgotten, and a refused one was not counted', () => {
  const at = 1_700_000_000_000;
  for (let count = 0; count < 10; count += 1) countTry(['name'], 10, at + count * 1000);
  expect(() => countTry(['name'], 10, at + 59_000)).toThrow(Problem);
  countTry(['name'], 10, at + 60_000);
  expect(() => countTry(['name'], 10, at + 60_500)).toThrow(Problem);
});
