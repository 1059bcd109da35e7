// What cannot be meant in a field, by what the field holds.
import { errorsOf, type Json, type Told } from './asker';

export interface BadBody {
  field: string;
  what: string;
  /** JSON text: it can say what no value of JavaScript's can. */
  bad: string;
}

const WRONG: Record<string, [string, string][]> = {
  number: [
    ['a word', '"NaN"'],
    ['a number in quotes', '"5"'],
    ['yes', 'true'],
    ['1e308', '1e308'],
    ['-1e308', '-1e308'],
    ['1e999', '1e999'],
    ['a list', '[]'],
  ],
  string: [
    ['a number', '5'],
    ['an object', '{}'],
    ['nothing', '""'],
    ['spaces', '"   "'],
    ['NUL', '"a\\u0000b"'],
    ['a lone surrogate', '"a\\ud800b"'],
    ['control characters alone', '"\\u0001\\u0002"'],
    ['a mark of direction', '"a\\u202eb"'],
    ['what cannot be seen', '"\\u200b\\u2060"'],
    ['900,000 letters', JSON.stringify('x'.repeat(900_000))],
  ],
  boolean: [
    ['a word', '"yes"'],
    ['1', '1'],
  ],
};

/** Where nothing to be seen is an honest answer: there is no note. A password is the broker's own business, a sensor's name its file's. */
const MAY_BE: Record<string, string[]> = {
  note: ['nothing', 'spaces', 'what cannot be seen'],
  text: ['nothing', 'spaces', 'what cannot be seen'],
  /** What stands at a side of a heap's section. */
  'section.left': ['nothing', 'spaces', 'what cannot be seen'],
  'section.right': ['nothing', 'spaces', 'what cannot be seen'],
  sensor: ['nothing', 'spaces'],
  'columns.0.sensor': ['spaces', 'what cannot be seen'],
  'mqtt.password': ['spaces', 'what cannot be seen'],
};

/** @returns what is wrong with the answer; null where it is a refusal that names the field and says what to do */
export function fault(told: Told, field: string): string | null {
  if (told.status !== 422) return `${told.status} ${told.text.slice(0, 160)}`;
  const errors = errorsOf(told) as { path: string; message: string }[];
  const own = errors.find((one) => one.path === field || one.path.startsWith(`${field}.`));
  const any = own ?? errors.find((one) => field.startsWith(`${one.path}.`));
  if (any === undefined) return `names ${errors.map((one) => one.path).join()}`;
  return /^Invalid|^Too |^Unrecognized|expected/i.test(any.message) ? `says only “${any.message}”` : null;
}

export function badBodies(body: Json): BadBody[] {
  return leaves(body).flatMap(({ at, value }) =>
    (WRONG[typeof value] ?? [])
      .filter(([what]) => MAY_BE[at.join('.')]?.includes(what) !== true)
      .map(([what, text]) => ({
        field: at.join('.'),
        what,
        bad: JSON.stringify(withLeaf(body, at)).replace('"<here>"', () => text),
      })),
  );
}

function leaves(value: unknown, at: string[] = []): { at: string[]; value: unknown }[] {
  if (typeof value !== 'object' || value === null) return [{ at, value }];
  return Object.entries(value).flatMap(([key, inner]) => leaves(inner, [...at, key]));
}

function withLeaf(value: unknown, [key, ...rest]: string[]): unknown {
  if (key === undefined) return '<here>';
  if (Array.isArray(value))
    return value.map((one: unknown, place) => (String(place) === key ? withLeaf(one, rest) : one));
  return { ...(value as Json), [key]: withLeaf((value as Json)[key], rest) };
}
