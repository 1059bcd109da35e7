import type { z } from 'zod';
import type { Action } from './permissions';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/**
 * One route, declared once: the guard asks it what may be done and what the body must be, and the interface's
 * description is made of it.
 */
export interface Operation {
  /** Also the word in the audit log, such as `channel.create`. */
  id: string;
  method: Method;
  /** Under /api/v1; `{house}` and the like are found by the guard, in the asker's holding only. */
  path: string;
  /** Null: anybody, signed in or not. */
  action: Action | null;
  summary: string;
  query?: z.ZodObject;
  body?: z.ZodType;
  /** It takes bytes instead of a body in JSON: of these media types, and at most so many. */
  takes?: { types: readonly string[]; mostBytes: number };
  /** What it answers, by status; null for an answer without a body. */
  answers: Partial<Record<number, z.ZodType | null>>;
  /** Other than JSON, by media type. */
  alsoAnswers?: readonly string[];
  /** It answers no JSON but this media type. */
  onlyAnswers?: string;
  /** The answer carries a token that is shown once. */
  secret?: boolean;
  /** A change that leaves no row in the audit log, because it changes nothing: a check of a draft. */
  unrecorded?: boolean;
}

/** Keeps the literal types, from which the guard knows what the handler is given. */
export function operation<const T extends Operation>(declared: T): T {
  return declared;
}

/** The names in braces of a path. */
export type ParamsOf<Path extends string> = Path extends `${string}{${infer Name}}${infer Rest}`
  ? Name | ParamsOf<Rest>
  : never;

export function paramsOf(path: string): string[] {
  return [...path.matchAll(/\{(\w+)\}/g)].map((match) => match[1] ?? '');
}
