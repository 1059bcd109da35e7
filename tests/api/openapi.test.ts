// The description is one that programs can be made from.
import { expect, test } from 'vitest';
import { NOBODY, type Json } from './asker';
import { OPERATIONS } from '@/lib/server/operations/all';

async function description(): Promise<Json> {
  const told = await NOBODY.get('/openapi.json');
  expect(told.status).toBe(200);
  return told.body;
}

function everyValue(of: unknown, key: string): unknown[] {
  if (typeof of !== 'object' || of === null) return [];
  return Object.entries<unknown>(of as Json).flatMap(([name, value]) => [
    ...(name === key ? [value] : []),
    ...everyValue(value, key),
  ]);
}

test('it is OpenAPI 3.1 and names every route', async () => {
  const told = await description();
  expect(told['openapi']).toBe('3.1.0');
  const named = Object.entries(told['paths'] as Record<string, Json>).flatMap(([path, methods]) =>
    Object.keys(methods).map((method) => `${method.toUpperCase()} ${path}`),
  );
  expect(named.sort()).toEqual(OPERATIONS.map((one) => `${one.method} ${one.path}`).sort());
});

test('every reference in it leads somewhere', async () => {
  const told = await description();
  const references = everyValue(told, '$ref');
  expect(references.length).toBeGreaterThan(10);
  for (const reference of references) {
    const target = String(reference)
      .replace('#/', '')
      .split('/')
      .reduce<unknown>((at, part) => (at as Json | undefined)?.[part], told);
    expect([reference, typeof target]).toEqual([reference, 'object']);
  }
});

test('operation ids are each once, and every brace of a path is a parameter', async () => {
  const told = await description();
  const ids = everyValue(told['paths'], 'operationId');
  expect(new Set(ids).size).toBe(ids.length);
  for (const [path, methods] of Object.entries(told['paths'] as Record<string, Record<string, Json>>)) {
    for (const operation of Object.values(methods)) {
      const parameters = (operation['parameters'] as Json[]).filter((one) => one['in'] === 'path');
      expect(parameters.map((one) => `{${String(one['name'])}}`)).toEqual(path.match(/\{\w+\}/g) ?? []);
    }
  }
});

test('what is required of a channel is what the description of the interface says', async () => {
  const paths = (await description())['paths'] as Record<string, Record<string, Json>>;
  const body = paths['/houses/{house}/channels']?.['post']?.['requestBody'] as {
    content: Record<string, Json>;
  };
  const schema = body.content['application/json']?.['schema'] as {
    required: string[];
    additionalProperties: boolean;
  };
  expect(schema.required.sort()).toEqual(
    ['number', 'node', 'relay', 'key', 'label', 'contact', 'load', 'minOn', 'minOff'].sort(),
  );
  expect(schema.additionalProperties).toBe(false);
});
