// Who may do what, generated: every route file × everybody × the permission table. A route without a declaration fails,
// and a declaration without a route.
import { beforeAll, describe, expect, test } from 'vitest';
import type { Operation } from '@/lib/server/operation';
import { OPERATIONS } from '@/lib/server/operations/all';
import { may, ROLES, type Role } from '@/lib/server/permissions';
import { Asker, newHolding, NOBODY, personOf, ROUTES } from '../api/asker';
import { furnish, type Furnished } from '../api/furnished';

/** Folders that answer for what is no route; they speak of nothing and know nobody. */
const NO_ROUTE = new Set(['/[...missing]']);

let own: Furnished;
let foreignOwner: Asker;
const people = new Map<Role, Asker>();
const programs = new Map<Role, Asker>();

beforeAll(async () => {
  const larkmoor = await newHolding('larkmoor');
  for (const role of ROLES) people.set(role, await personOf(larkmoor, role, `${role}@larkmoor.example`));
  const owner = people.get('owner') ?? NOBODY;
  for (const role of ROLES) {
    const made = await owner.make('/api-keys', { name: `key ${role}`, role });
    programs.set(role, new Asker({ 'x-api-key': String(made['key']) }));
  }
  own = await furnish(larkmoor, owner);
  foreignOwner = await personOf(await newHolding('stonebeck'), 'owner', 'owner@stonebeck.example');
});

const guarded = OPERATIONS.filter((operation) => operation.action !== null);
const named = (operations: readonly Operation[]) =>
  operations.map((operation) => [`${operation.method} ${operation.path}`, operation] as const);

test('every route file is declared and every declaration has its route file', async () => {
  const declared = OPERATIONS.map((operation) => `${operation.method} ${operation.path}`).sort();
  const found: string[] = [];
  for (const [path, load] of ROUTES) {
    if (NO_ROUTE.has(path)) continue;
    for (const method of Object.keys(await load())) found.push(`${method} ${path}`);
  }
  expect(found.sort()).toEqual(declared);
});

test('only routes that say so are open to anybody', () => {
  const open = OPERATIONS.filter((operation) => operation.action === null).map((operation) => operation.id);
  expect(open.sort()).toEqual(['calendar.get', 'health.get', 'invitation.accept', 'openapi.get']);
});

/** A body that no schema takes: whoever gets as far as the body is let in by session, holding and role. */
const UNREADABLE = '{';

async function statusOf(asker: Asker, operation: Operation): Promise<number> {
  const body = operation.method === 'GET' || operation.body === undefined ? undefined : UNREADABLE;
  return (await asker.ask(operation.method, own.pathOf(operation.path), body)).status;
}

/** Changes without a body would be carried out, so for those who may they are not tried here but in their own tests. */
const acts = (operation: Operation) => operation.method !== 'GET' && operation.body === undefined;

describe.each(named(guarded))('%s', (_name, operation) => {
  test('nobody without a session or key is told anything', async () => {
    expect(await statusOf(NOBODY, operation)).toBe(401);
    expect(await statusOf(new Asker({ 'x-api-key': 'wrong' }), operation)).toBe(401);
  });

  test.each(ROLES)('as %s by the permission table', async (role) => {
    const allowed = operation.action !== null && may(role, operation.action);
    if (allowed && acts(operation)) return;
    for (const asker of [people.get(role), programs.get(role)]) {
      const status = await statusOf(asker ?? NOBODY, operation);
      if (allowed) expect([200, 422]).toContain(status);
      else expect(status).toBe(403);
    }
  });

  test("another holding's owner gets what a thing that is not there gets, byte for byte", async () => {
    if (!operation.path.includes('{')) return;
    const body = operation.method === 'GET' ? undefined : UNREADABLE;
    const foreign = await foreignOwner.ask(operation.method, own.pathOf(operation.path), body);
    const missing = await foreignOwner.ask(operation.method, own.missingOf(operation.path), body);
    expect([foreign.status, missing.status]).toEqual([404, 404]);
    expect(foreign.text).toBe(missing.text);
    expect([...foreign.headers]).toEqual([...missing.headers]);
  });

  test("another holding's lists hold nothing of this one", async () => {
    if (operation.path.includes('{') || operation.method !== 'GET') return;
    const told = await foreignOwner.ask('GET', own.pathOf(operation.path));
    expect(told.status).toBe(200);
    for (const trace of own.traces) expect(told.text).not.toContain(trace);
  });
});
