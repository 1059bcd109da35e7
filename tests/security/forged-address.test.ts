// The real door before the real sign-in: an address that a client claims is not believed.
import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { closePools } from '@/db/client';
import { answerAuth } from '@/lib/server/auth-door';
import { createFront, type Front } from '@/worker/door/front';

let front: Front;
let web: http.Server;
let door: http.Server;
const portOf = (server: http.Server) => (server.address() as AddressInfo).port;
const listening = (server: http.Server) =>
  new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));

beforeAll(async () => {
  web = http.createServer((request, response) => {
    const headers = new Headers();
    for (const [name, value] of Object.entries(request.headers)) {
      if (typeof value === 'string') headers.set(name, value);
    }
    const parts: Buffer[] = [];
    request.on('data', (part: Buffer) => parts.push(part));
    request.on('end', () => {
      const asked = new Request(`http://localhost:3000${request.url ?? ''}`, {
        method: 'POST',
        headers,
        body: Buffer.concat(parts),
      });
      void answerAuth(asked).then(async (answer) => {
        response.writeHead(answer.status, Object.fromEntries(answer.headers));
        response.end(await answer.text());
      });
    });
  });
  await listening(web);
  front = createFront({ webPort: portOf(web), leaderPort: () => null, trustProxy: false });
  door = http.createServer(front.onRequest);
  await listening(door);
});
afterAll(async () => {
  front.close();
  door.close();
  web.close();
  await closePools();
});

test('a client that claims another address with each try is refused at the eleventh all the same', async () => {
  const statuses: number[] = [];
  for (let count = 0; count < 11; count += 1) {
    const claimed = `203.0.113.${count}`;
    const response = await fetch(`http://127.0.0.1:${portOf(door)}/api/auth/sign-in/email`, {
      method: 'POST',
      headers: {
        'content-type': 'application/json',
        origin: 'http://localhost:3000',
        'x-forwarded-for': claimed,
        'x-real-ip': claimed,
        forwarded: `for=${claimed}`,
      },
      body: JSON.stringify({ email: `somebody-${count}@larkmoor.example`, password: 'a wrong guess' }),
    });
    statuses.push(response.status);
    await response.text();
  }
  expect(statuses).toEqual([...Array<number>(10).fill(401), 429]);
});
