import { expect, it } from 'vitest';
import { Name, SEEN, Why } from '@/lib/schema/common';

const said = (schema: typeof Name, text: string) =>
  schema.safeParse(text).error?.issues.map((one) => one.message) ?? [];

it.each([
  ['', ['Give a name.']],
  ['  ', ['Give a name.']],
  ['\u200b\u2060', [SEEN]],
  ['Gate\nheap', ['Give one line, without tabs.']],
  ['Gate heap', []],
])('a name %o is told one thing at most', (text, messages) => expect(said(Name, text)).toEqual(messages));

it('a reason that is not there is asked for, one that cannot be seen is not taken for it', () => {
  expect(said(Why, '')).toEqual(['Say why in a few words.']);
  expect(said(Why, '\u200b')).toEqual([SEEN]);
});
