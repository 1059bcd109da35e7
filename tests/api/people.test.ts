// People come by letter, are told apart by role, and leave; the letters really pass through a mail server on loopback.
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Holding } from '@/db/client';
import { answerAuth } from '@/lib/server/auth-door';
import {
  Asker,
  errorsOf,
  itemsOf,
  newHolding,
  NOBODY,
  ORIGIN,
  PASSWORD,
  personOf,
  signIn,
  tryToSignIn,
} from './asker';
import { openMailbox, type Mailbox } from './mailbox';

let mailbox: Mailbox;
let larkmoor: Holding;
let owner: Asker;
beforeAll(async () => {
  mailbox = await openMailbox();
  larkmoor = await newHolding('larkmoor');
  owner = await personOf(larkmoor, 'owner', 'owner@larkmoor.example');
});
afterAll(() => mailbox.close());

async function invited(email: string, role: string) {
  const invitation = await owner.make('/invitations', { email, role });
  const letter = await mailbox.letterTo(email);
  const token = /token=([\w-]+)/.exec(letter)?.[1] ?? '';
  return { path: `/join/${String(invitation['id'])}`, token, id: String(invitation['id']) };
}
const NEW = { name: 'A new grower', password: 'frost barrow lantern quince' };

test('an invited person makes an account with the letter and signs in with the role they were given', async () => {
  const { path, token } = await invited('new@larkmoor.example', 'grower');
  expect(await NOBODY.ask('POST', path, { token, ...NEW })).toMatchObject({ status: 204 });
  const grower = await signIn('new@larkmoor.example', NEW.password);
  expect(await grower.get('/me')).toMatchObject({ body: { role: 'grower', email: 'new@larkmoor.example' } });
  expect(await NOBODY.ask('POST', path, { token, ...NEW })).toMatchObject({ status: 404 });
});

test('the invitation without the token of its letter is as absent as none', async () => {
  const { path } = await invited('absent@larkmoor.example', 'grower');
  const without = await NOBODY.ask('POST', path, { token: 'x', ...NEW });
  const none = await NOBODY.ask('POST', '/join/018f3f3f-0000-7000-8000-000000000000', { token: 'x', ...NEW });
  expect(without.status).toBe(404);
  expect(without.text).toBe(none.text);
});

test('an invitation that was taken back cannot be taken up', async () => {
  const { path, token, id } = await invited('back@larkmoor.example', 'grower');
  expect(await owner.ask('DELETE', `/invitations/${id}`)).toMatchObject({ status: 204 });
  expect(await NOBODY.ask('POST', path, { token, ...NEW })).toMatchObject({ status: 404 });
});

test('a password that is short or among the first to be guessed is refused at its field', async () => {
  const { path, token } = await invited('weak@larkmoor.example', 'grower');
  for (const password of [
    'short',
    'greenhouse greenhouse',
    'middenward2026!!',
    'aaaaaaaaaaaaaaaaaa',
    '123456789012345',
  ]) {
    const told = await NOBODY.ask('POST', path, { token, name: 'W', password });
    expect(told.status).toBe(422);
    expect(errorsOf(told)).toEqual([{ path: 'password', message: expect.any(String) }]);
  }
});

test('a role that is none is refused at its field', async () => {
  const told = await owner.ask('POST', '/invitations', { email: 'x@larkmoor.example', role: 'king' });
  expect(told).toMatchObject({ status: 422, body: { errors: [{ path: 'role' }] } });
});

test('the last owner neither goes nor becomes something else', async () => {
  const people = itemsOf(await owner.get('/people'));
  const id = String(people.find((one) => one['email'] === 'owner@larkmoor.example')?.['id']);
  expect(await owner.ask('PATCH', `/people/${id}`, { role: 'grower' })).toMatchObject({ status: 409 });
  expect(await owner.ask('DELETE', `/people/${id}`)).toMatchObject({ status: 409 });
});

test('whoever is taken out is signed out at once', async () => {
  const leaver = await personOf(larkmoor, 'installer', 'leaver@larkmoor.example');
  expect(await leaver.get('/houses')).toMatchObject({ status: 200 });
  const people = itemsOf(await owner.get('/people'));
  const id = String(people.find((one) => one['email'] === 'leaver@larkmoor.example')?.['id']);
  expect(await owner.ask('DELETE', `/people/${id}`)).toMatchObject({ status: 204 });
  expect(await leaver.get('/houses')).toMatchObject({ status: 401 });
});

test('a lowered role holds for the very next request', async () => {
  const second = await personOf(larkmoor, 'owner', 'second@larkmoor.example');
  const people = itemsOf(await owner.get('/people'));
  const id = String(people.find((one) => one['email'] === 'second@larkmoor.example')?.['id']);
  expect(await second.get('/audit')).toMatchObject({ status: 200 });
  expect(await owner.ask('PATCH', `/people/${id}`, { role: 'grower' })).toMatchObject({ status: 200 });
  expect(await second.get('/audit')).toMatchObject({ status: 403 });
});

test('a new password is set by letter, and ends every session', async () => {
  const forgetful = await personOf(larkmoor, 'grower', 'forgetful@larkmoor.example');
  const asked = await authAsk('/request-password-reset', { email: 'forgetful@larkmoor.example' });
  expect(asked.status).toBe(200);
  const token = /token=([\w-]+)/.exec(await mailbox.letterTo('forgetful@larkmoor.example'))?.[1] ?? '';
  expect((await authAsk('/reset-password', { token, newPassword: 'password password' })).status).toBe(422);
  expect((await authAsk('/reset-password', { token, newPassword: NEW.password })).status).toBe(200);
  expect(await forgetful.get('/me')).toMatchObject({ status: 401 });
  expect((await authAsk('/reset-password', { token, newPassword: NEW.password })).status).toBe(400);
  expect(await (await signIn('forgetful@larkmoor.example', NEW.password)).get('/me')).toMatchObject({
    status: 200,
  });
});

test('asking for a letter tells nobody whether an address is known', async () => {
  const known = await authAsk('/request-password-reset', { email: 'owner@larkmoor.example' });
  const unknown = await authAsk('/request-password-reset', { email: 'nobody@larkmoor.example' });
  expect(unknown.status).toBe(known.status);
  expect(await unknown.text()).toBe(await known.text());
});

test('a wrong password and an unknown account are refused alike', async () => {
  const wrong = await tryToSignIn('owner@larkmoor.example', 'not the password at all');
  const unknown = await tryToSignIn('nobody@larkmoor.example', 'not the password at all');
  expect([wrong.status, unknown.status]).toEqual([401, 401]);
  expect(await wrong.text()).toBe(await unknown.text());
});

test('the session goes out in a cookie that no script reads, and nowhere else', async () => {
  const response = await tryToSignIn('owner@larkmoor.example', PASSWORD);
  const [cookie] = response.headers.getSetCookie();
  expect(cookie).toMatch(/^middenward\.session=[^;]+;.*HttpOnly/i);
  expect(cookie).toMatch(/SameSite=Lax/i);
  const token = decodeURIComponent(/=([^;]+)/.exec(cookie ?? '')?.[1] ?? '').split('.')[0] ?? '';
  expect(token.length).toBeGreaterThan(20);
  expect(await response.text()).not.toContain(token);
});

test('nobody signs up, and what else the sign-in library could do is not there', async () => {
  for (const path of [
    '/sign-up/email',
    '/organization/create',
    '/update-user',
    '/list-sessions',
    '/delete-user',
  ]) {
    expect((await authAsk(path, {})).status).toBe(404);
  }
});

test("a program's key is told once, works with its role, and ends when it is revoked", async () => {
  const made = await owner.make('/api-keys', { name: 'logger', role: 'installer' });
  const program = new Asker({ 'x-api-key': String(made['key']) });
  expect(await program.get('/me')).toMatchObject({ status: 200, body: { role: 'installer', email: null } });
  expect(await program.get('/audit')).toMatchObject({ status: 403 });
  expect((await owner.get('/api-keys')).text).not.toContain(String(made['key']));
  expect(await owner.ask('DELETE', `/api-keys/${String(made['id'])}`)).toMatchObject({ status: 204 });
  expect(await program.get('/me')).toMatchObject({ status: 401 });
});

function authAsk(path: string, body: object): Promise<Response> {
  return answerAuth(
    new Request(`${ORIGIN}/api/auth${path}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: ORIGIN, 'x-forwarded-for': '10.9.9.9' },
      body: JSON.stringify(body),
    }),
  );
}
