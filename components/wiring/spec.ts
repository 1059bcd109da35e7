/**
 * A form as a list of what it asks, so that seven things of the yard share one form. Values are text as typed; the body
 * that is sent is made of them in SI, and judged by the same schema that the route uses.
 */
import { fieldText, fieldValue, unreadable, type Quantity } from '@/lib/units/fields';
import type { Preferences } from '@/lib/units/preferences';

/** What an empty field means: it must be filled, is sent as null, or is left out. */
export type Empty = 'refuse' | 'null' | 'omit';

interface Own {
  /** Dotted, as in the body. */
  path: string;
  label: string;
  hint?: string;
}
export type Spec =
  | (Own & { as: 'text'; empty?: Empty; long?: boolean; secret?: boolean })
  | (Own & { as: 'number'; quantity: Quantity; unit?: string; empty?: Empty })
  | (Own & { as: 'choice'; options: { value: string; label: string }[]; empty?: Empty; none?: string })
  | (Own & { as: 'check' });

export interface Group {
  title?: string;
  note?: string;
  specs: Spec[];
  /** Two or three fields a row on a wide screen. */
  columns?: 1 | 2 | 3;
  /** The object at `path` as a whole is null while the field at `unless` is empty. */
  nullUnless?: { path: string; unless: string };
  /** Asked and sent only while the field at `path` holds this. */
  when?: { path: string; is: string };
  /** Folded away until asked for: what a first set-up need not know. Neighbours of one name fold together. */
  folded?: string;
}

export type Values = { [key: string]: string | boolean | Values };
export type Errors = Record<string, string>;

type Json = { [key: string]: unknown };

export function at(from: unknown, path: string): unknown {
  return path
    .split('.')
    .reduce<unknown>(
      (value, key) => (typeof value === 'object' && value !== null ? Reflect.get(value, key) : undefined),
      from,
    );
}

function put(into: Json, path: string, value: unknown): void {
  const keys = path.split('.');
  const last = keys.pop() ?? path;
  let place = into;
  for (const key of keys) {
    const next = place[key];
    if (typeof next === 'object' && next !== null) place = next as Json;
    else place = place[key] = {};
  }
  place[last] = value;
}

/** Groups as they are shown: those that fold together are one section, each other stands alone. */
export function sectionsOf(groups: Group[]): Group[][] {
  const sections: Group[][] = [];
  for (const group of groups) {
    const last = sections.at(-1);
    if (group.folded !== undefined && last?.[0]?.folded === group.folded) last.push(group);
    else sections.push([group]);
  }
  return sections;
}

/** What the fields hold at first: the entity as text. */
export function valuesOf(groups: Group[], entity: unknown, preferences: Preferences): Values {
  const values: Json = {};
  for (const spec of groups.flatMap((group) => group.specs)) {
    const value = at(entity, spec.path);
    put(values, spec.path, textOf(spec, value, preferences));
  }
  return values as Values;
}

function textOf(spec: Spec, value: unknown, preferences: Preferences): string | boolean {
  if (spec.as === 'check') return value === true;
  if (spec.as === 'number')
    return fieldText(typeof value === 'number' ? value : null, spec.quantity, preferences);
  return typeof value === 'string' ? value : '';
}

/**
 * The body to send, and what could not be read.
 * @param first what the fields held at first: an object that was there is taken away by emptying its first field, while
 *   one that was not, and has something typed, lacks that field
 */
export function bodyOf(
  groups: Group[],
  values: unknown,
  preferences: Preferences,
  first?: Values,
): { body: Json; errors: Errors } {
  const body: Json = {};
  const errors: Errors = {};
  for (const group of groups.filter((one) => isAsked(one, values))) {
    const off = group.nullUnless !== undefined && isEmpty(at(values, group.nullUnless.unless));
    if (group.nullUnless !== undefined && off) {
      const { path, unless } = group.nullUnless;
      put(body, path, null);
      const asked = group.specs.find((spec) => spec.path === unless);
      const isTyped = group.specs.some((spec) => spec.path !== unless && !isEmpty(at(values, spec.path)));
      if (asked !== undefined && isTyped && first !== undefined && isEmpty(at(first, unless)))
        errors[unless] = missing(asked, preferences);
    }
    for (const spec of group.specs) {
      if (off && group.nullUnless !== undefined && spec.path.startsWith(`${group.nullUnless.path}.`))
        continue;
      readSpec(spec, at(values, spec.path), preferences, body, errors);
    }
  }
  return { body, errors };
}

/** Whether a group is asked, as the form stands. */
export function isAsked({ when }: Group, values: unknown): boolean {
  return when === undefined || at(values, when.path) === when.is;
}

function isEmpty(value: unknown): boolean {
  return typeof value !== 'string' || value.trim() === '';
}

function readSpec(spec: Spec, typed: unknown, preferences: Preferences, body: Json, errors: Errors): void {
  if (spec.as === 'check') return put(body, spec.path, typed === true);
  if (typeof typed !== 'string' || typed.trim() === '') {
    const empty = spec.empty ?? 'refuse';
    if (empty === 'null') put(body, spec.path, null);
    else if (empty === 'refuse') errors[spec.path] = missing(spec, preferences);
    return;
  }
  if (spec.as !== 'number') return put(body, spec.path, typed.trim());
  const value = fieldValue(typed, spec.quantity, preferences);
  if (value === null) errors[spec.path] = unreadable(spec.quantity, preferences);
  else put(body, spec.path, value);
}

function missing(spec: Spec, preferences: Preferences): string {
  if (spec.as === 'number') return unreadable(spec.quantity, preferences);
  return spec.as === 'choice' ? 'Choose one.' : 'This is missing.';
}

/** Issues of the schema by dotted path, the first of each; those that a field does not show come under ''. */
export function issuesOf(
  issues: readonly { path: PropertyKey[]; message: string }[],
  groups: Group[],
): Errors {
  const shown = new Set(groups.flatMap((group) => group.specs.map((spec) => spec.path)));
  const errors: Errors = {};
  for (const issue of issues) {
    const path = issue.path.map(String).join('.');
    errors[shown.has(path) ? path : ''] ??= issue.message;
  }
  return errors;
}

/** Errors as react-hook-form keeps them: nested as the values are. */
export function nested(errors: Errors): Json {
  const into: Json = {};
  for (const [path, message] of Object.entries(errors))
    put(into, path === '' ? 'root' : path, { type: 'said', message });
  return into;
}
