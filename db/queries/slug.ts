/**
 * First parts of our addresses that are no house: pages and routes of app/, and what the door sends to the worker. A house
 * stands at /its-slug, so one that were named like a page could never be opened.
 */
export const NO_HOUSE: readonly string[] = [
  'account',
  'api',
  'field',
  'forgot-password',
  'houses',
  'invitation',
  'live',
  'new-house',
  'offline-book',
  'people',
  'reset-password',
  'sign-in',
];

/**
 * A name in kebab case, free among `taken`.
 * @example freeSlug('Long house', new Set(['long-house'])) === 'long-house-2'
 */
export function freeSlug(name: string, taken: ReadonlySet<string>): string {
  const plain = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-+$/, '');
  const base = plain === '' ? 'unnamed' : plain;
  if (!taken.has(base)) return base;
  for (let count = 2; ; count += 1) {
    const slug = `${base}-${count}`;
    if (!taken.has(slug)) return slug;
  }
}
