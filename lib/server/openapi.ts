import { z } from 'zod';
import { OPERATIONS } from './operations/all';
import { paramsOf, type Operation } from './operation';

type Json = Record<string, unknown>;

const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  code: z.string(),
  detail: z.string(),
  errors: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
});

const PROBLEMS: Record<number, string> = {
  401: 'Not signed in',
  403: 'The role may not do this',
  404: 'No such thing in this holding',
  409: 'The present state does not allow it',
  412: 'Changed since it was read (If-Match)',
  413: 'The body is over 1 MiB',
  422: 'A field needs another look; `errors` names it by its dotted path',
  429: 'Too many tries; see Retry-After',
};

/** The interface described as OpenAPI 3.1, made of the same declarations that guard it. */
export function describe(): Json {
  const paths: Record<string, Json> = {};
  for (const operation of OPERATIONS) {
    const at = (paths[operation.path] ??= {});
    at[operation.method.toLowerCase()] = described(operation);
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Middenward',
      version: '1',
      description:
        'Durations in whole seconds, temperatures in °C, times ISO 8601 with offset. Lists go on by `cursor`. Send `If-Match` with an ETag to be refused where somebody changed the thing meanwhile, `Idempotency-Key` to act once.',
    },
    servers: [{ url: '/api/v1' }],
    security: [{ session: [] }, { key: [] }],
    paths,
    components: {
      securitySchemes: {
        session: {
          type: 'apiKey',
          in: 'cookie',
          name: 'middenward.session',
          description: 'Set by POST /api/auth/sign-in/email with {email, password} and an Origin header.',
        },
        key: { type: 'apiKey', in: 'header', name: 'x-api-key' },
      },
      schemas: { Problem: schemaOf(Problem, 'output'), ...shared },
    },
  };
}

/** Schemas that name themselves, such as a condition inside a condition. */
const shared: Json = {};

/** What zod points to inside the schema stands in the document's components. */
function repointed(schema: object): Json {
  return JSON.parse(JSON.stringify(schema).replaceAll('"#/$defs/', '"#/components/schemas/')) as Json;
}

function described(operation: Operation): Json {
  const { id, summary, body, action } = operation;
  return {
    operationId: id,
    summary,
    ...(action === null ? { security: [] } : { 'x-action': action }),
    parameters: [
      ...paramsOf(operation.path).map(pathParameter),
      ...queryParameters(operation),
      ...headers(operation),
    ],
    ...(operation.takes === undefined ? {} : { requestBody: bytesOf(operation.takes.types) }),
    ...(body === undefined
      ? {}
      : {
          requestBody: {
            required: !body.safeParse({}).success,
            content: { 'application/json': { schema: schemaOf(body, 'input') } },
          },
        }),
    responses: { ...answers(operation), ...problems(operation) },
  };
}

function bytesOf(types: readonly string[]): Json {
  return { required: true, content: Object.fromEntries(types.map((type) => [type, {}])) };
}

function pathParameter(name: string): Json {
  return {
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
    description: 'Id, slug, key or number',
  };
}

function queryParameters(operation: Operation): Json[] {
  if (operation.query === undefined) return [];
  const { properties, required } = schemaOf(operation.query, 'input');
  const needed: unknown[] = Array.isArray(required) ? required : [];
  return Object.entries((properties ?? {}) as Json).map(([name, schema]) => ({
    name,
    in: 'query',
    required: needed.includes(name),
    schema,
  }));
}

function headers(operation: Operation): Json[] {
  if (operation.method === 'GET' || operation.action === null) return [];
  return ['If-Match', 'Idempotency-Key'].map((name) => ({ name, in: 'header', schema: { type: 'string' } }));
}

function answers(operation: Operation): Json {
  const entries = Object.entries(operation.answers).map(([status, schema]): [string, Json] => {
    const description = STATUS[Number(status)] ?? 'Answer';
    if (schema === null || schema === undefined) return [status, { description }];
    const also = (operation.alsoAnswers ?? []).map((type): [string, Json] => [
      type,
      { schema: { type: 'string' } },
    ]);
    const content = {
      'application/json': { schema: schemaOf(schema, 'output') },
      ...Object.fromEntries<unknown>(also),
    };
    return [status, { description, content }];
  });
  const { onlyAnswers } = operation;
  if (onlyAnswers === undefined) return Object.fromEntries(entries);
  const whole: [string, Json] = ['200', { description: 'Done', content: { [onlyAnswers]: {} } }];
  return Object.fromEntries([...entries, whole]);
}

const STATUS: Record<number, string> = {
  200: 'Done',
  201: 'Made',
  204: 'Done; no body',
  503: 'Something is down',
};

function problems(operation: Operation): Json {
  const isOpen = operation.action === null;
  const codes = [
    ...(isOpen ? [] : [401, 403]),
    ...(paramsOf(operation.path).length > 0 ? [404] : []),
    ...(operation.method === 'GET' || isOpen ? [] : [409, 412]),
    ...(operation.body === undefined && operation.query === undefined && operation.takes === undefined
      ? []
      : [422]),
    ...(operation.body === undefined && operation.takes === undefined ? [] : [413]),
  ];
  const content = { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } };
  return Object.fromEntries(codes.map((code) => [code, { description: PROBLEMS[code] ?? '', content }]));
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  // a transform has an input side only; what cannot be told in JSON Schema is told as anything
  const { $schema: _dialect, $defs, ...made } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  Object.assign(shared, repointed($defs ?? {}));
  return repointed(made);
}
