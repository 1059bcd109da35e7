/** What a holding does not have is not there: the answer itself says so, not only the words on the page. */
import { beforeAll, describe, expect, it } from 'vitest';
import { sharedApp } from '../support/shared-app';

const cookies = new Map<string, string>();

beforeAll(async () => {
  const { url, password } = sharedApp();
  for (const email of ['owner@larkmoor.example', 'owner@stonebeck.example']) {
    const answer = await fetch(`${url}/api/auth/sign-in/email`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: url },
      body: JSON.stringify({ email, password }),
    });
    const lines = answer.headers.getSetCookie().map((line) => line.split(';')[0]);
    cookies.set(email, lines.join('; '));
  }
});

async function page(path: string, email = 'owner@larkmoor.example') {
  const answer = await fetch(`${sharedApp().url}${path}`, {
    headers: { cookie: cookies.get(email) ?? '', accept: 'text/html' },
    redirect: 'manual',
  });
  return { status: answer.status, text: await answer.text() };
}

const PAGES = ['watch', 'rules', 'wiring', 'duty', 'heap-book', 'alarms'];
const RULE = 'rules/gate-heap-fan-by-the-bench';

describe('a page of a house', () => {
  it.each([...PAGES, RULE])('/long-house/%s is there for its own holding', async (path) => {
    expect((await page(`/long-house/${path}`)).status).toBe(200);
  });

  it.each([...PAGES, RULE])(
    '/long-house/%s answers 404 to another holding, and shows nothing',
    async (path) => {
      const { status, text } = await page(`/long-house/${path}`, 'owner@stonebeck.example');
      expect(status).toBe(404);
      expect(text).toContain('There is no such page here.');
      expect(text).not.toContain('Gate heap');
    },
  );

  it.each([...PAGES, RULE])('/no-such-house/%s answers 404', async (path) => {
    expect((await page(`/no-such-house/${path}`)).status).toBe(404);
  });

  it('answers 404 for a rule that never was, and for one of another house of the same holding', async () => {
    expect((await page('/long-house/rules/nothing')).status).toBe(404);
    expect((await page(`/prop-house/${RULE}`)).status).toBe(404);
  });
});
