/** Takes mail on loopback where no mail server is set up, and keeps it so that it can be read in the app. */
import { SMTPServer } from 'smtp-server';
import { keepSinkMessage } from '@/db/queries/mail';
import type { Base } from '../base';
import { parseLetter } from './letter';

const LETTER_BYTES = 1024 * 1024;

export function startMailSink(base: Base, port: number): Promise<SMTPServer> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    size: LETTER_BYTES,
    logger: false,
    onData(stream, session, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (stream.sizeExceeded) return done(new Error('the message is too long'));
        const { mailFrom, rcptTo } = session.envelope;
        const { subject, text } = parseLetter(Buffer.concat(chunks).toString('utf8'));
        const from = mailFrom === false ? '' : mailFrom.address;
        const at = base.clock.realNow();
        Promise.all(
          rcptTo.map(({ address: to }) => keepSinkMessage(base.db, { at, from, to, subject, text })),
        ).then(
          () => done(),
          (error: unknown) => {
            base.log.error({ err: error }, 'a message could not be kept');
            done(new Error('the message could not be kept; try again'));
          },
        );
      });
    },
  });
  server.on('error', (error) => base.log.error({ err: error }, 'the mail sink failed'));
  return new Promise((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve(server));
  });
}
