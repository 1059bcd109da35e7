import type { z } from 'zod';

export interface BodyError {
  /** Dotted, such as `band.0.low`; empty for the body as a whole. */
  path: string;
  message: string;
}

type Issue = z.core.$ZodIssue;

/** Says each issue at its dotted path, unknown keys one by one, and of a choice the form that came nearest. */
export function bodyErrors(error: z.ZodError): BodyError[] {
  const told = new Set<string>();
  return error.issues
    .flatMap((issue) => errorsOf(issue, []))
    .filter(({ path }) => {
      // what was not understood fails every further look: its first failing says why
      if (told.has(path)) return false;
      told.add(path);
      return true;
    });
}

function errorsOf(issue: Issue, above: PropertyKey[]): BodyError[] {
  const path = [...above, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ path: dotted([...path, key]), message: 'There is no such field.' }));
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    const nearest = [...issue.errors].sort((one, other) => depth(other) - depth(one))[0] ?? [];
    if (depth(nearest) > 0) return nearest.flatMap((inner) => errorsOf(inner, path));
  }
  return [{ path: dotted(path), message: issue.message }];
}

/** How far into the body a form of a choice was followed before it failed. */
function depth(issues: Issue[]): number {
  if (issues.some((issue) => issue.code === 'unrecognized_keys' && issue.path.length === 0)) return 0;
  return Math.max(
    0,
    ...issues.map(
      (issue) =>
        issue.path.length + (issue.code === 'invalid_union' ? Math.max(0, ...issue.errors.map(depth)) : 0),
    ),
  );
}

function dotted(path: PropertyKey[]): string {
  return path.map(String).join('.');
}

/** Messages for what the schemas themselves say nothing about; handed to `safeParse`. */
export function sayPlainly(issue: z.core.$ZodRawIssue): string | undefined {
  switch (issue.code) {
    case 'invalid_type':
      if (issue.input === undefined) return 'This is missing.';
      return `Give ${KINDS[issue.expected] ?? 'another kind of value'}.`;
    case 'invalid_value':
      return `Give one of: ${issue.values.map(String).join(', ')}.`;
    case 'invalid_union':
      return 'This has none of the forms that are taken here.';
    case 'too_small':
      return issue.origin === 'number' || issue.origin === 'int'
        ? `At least ${String(issue.minimum)}.`
        : `At least ${counted(Number(issue.minimum), issue.origin)}.`;
    case 'too_big':
      return issue.origin === 'number' || issue.origin === 'int'
        ? `At most ${String(issue.maximum)}.`
        : `At most ${counted(Number(issue.maximum), issue.origin)}.`;
    case 'invalid_format':
      return FORMATS[issue.format];
    default:
      return undefined;
  }
}

function counted(many: number, origin: string): string {
  const [one, more] = origin === 'string' ? ['character', 'characters'] : ['entry', 'entries'];
  return `${many} ${many === 1 ? one : more}`;
}

const FORMATS: Record<string, string> = {
  email: 'Give an e-mail address, such as name@example.org.',
  uuid: 'Give a UUID.',
};

const KINDS: Record<string, string> = {
  string: 'text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
  nan: 'a number',
};
