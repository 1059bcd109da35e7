import { readdirSync } from 'node:fs';
import { expect, it } from 'vitest';
import { freeSlug, NO_HOUSE } from '@/db/queries/slug';

/** First parts of addresses as Next makes them of app/: a folder in parentheses groups, and is no part. */
function firstParts(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true })
    .filter((entry) => entry.isDirectory())
    .flatMap(({ name }) => (name.startsWith('(') ? firstParts(`${folder}/${name}`) : [name]))
    .filter((name) => !name.startsWith('['));
}

it('no house can take the address of a page or a route', () => {
  const parts = firstParts('app');
  expect(parts).toContain('people');
  expect(parts.filter((part) => !NO_HOUSE.includes(part))).toEqual([]);
});

it.each([
  ['People', 'people-2'],
  ['New house!', 'new-house-2'],
  ['Sign-in', 'sign-in-2'],
  ['Live', 'live-2'],
  ['Long house', 'long-house'],
])('a house named %s is at /%s', (name, slug) => {
  expect(freeSlug(name, new Set(NO_HOUSE))).toBe(slug);
});
