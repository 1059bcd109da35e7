import 'server-only';
import type { z } from 'zod';
import { refuseForeignOrigin } from './caller';
import { problemResponse } from './errors';
import { check } from './check';
import type { Operation } from './operation';
import { parseJson, readText } from './request-body';

type Context = { params: Promise<Record<string, string>> };

interface Asking<T extends Operation> {
  request: Request;
  params: Record<string, string>;
  body: T['body'] extends z.ZodType ? z.output<T['body']> : undefined;
}

/** A route for anybody, signed in or not; what it may tell is its own to know. */
export function open<const T extends Operation>(
  operation: T,
  handle: (asking: Asking<T>) => Promise<Response> | Response,
) {
  return async (request: Request, context: Context): Promise<Response> => {
    try {
      if (request.method !== 'GET') refuseForeignOrigin(request);
      const { body: schema } = operation;
      const body = schema === undefined ? undefined : check(schema, parseJson(await readText(request)));
      // The shape of the body is what `check` has just made of it.
      return await handle({ request, params: await context.params, body } as Asking<T>);
    } catch (error) {
      return problemResponse(error);
    }
  };
}
