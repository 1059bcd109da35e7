// A mail server of the test's own, on a free loopback port. To be opened before the environment is first read.
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';

export interface Mailbox {
  letterTo: (address: string) => Promise<string>;
  close: () => Promise<void>;
}

export async function openMailbox(): Promise<Mailbox> {
  const letters: { to: string[]; text: string }[] = [];
  const waiting = new Set<() => void>();
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData(stream, session, done) {
      const parts: Buffer[] = [];
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.on('end', () => {
        const raw = Buffer.concat(parts).toString('utf8');
        // quoted-printable, as far as the links in the letters need it
        const text = raw.replace(/=\r?\n/g, '').replace(/=3D/g, '=');
        letters.push({ to: session.envelope.rcptTo.map((one) => one.address), text });
        for (const look of waiting) look();
        done();
      });
    },
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  process.env['MAIL_PORT'] = String((server.server.address() as AddressInfo).port);
  return {
    letterTo: (address) =>
      new Promise((resolve, reject) => {
        const give = setTimeout(() => reject(new Error(`no letter to ${address} came`)), 10_000);
        const look = () => {
          const letter = letters.findLast((one) => one.to.includes(address));
          if (letter === undefined) return;
          clearTimeout(give);
          waiting.delete(look);
          resolve(letter.text);
        };
        waiting.add(look);
        look();
      }),
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
