import 'server-only';
import { createTransport, type Transporter } from 'nodemailer';
import { env } from './env';
import { log } from './log';

export interface Letter {
  to: string;
  subject: string;
  text: string;
  /** The same for readers that show it; the text stands for itself. */
  html?: string;
}

let transport: Transporter | undefined;

function outgoing(): Transporter {
  const { SMTP_URL, MAIL_PORT } = env();
  // The sink is on loopback and has no certificate, so STARTTLS is not tried there.
  transport ??= SMTP_URL
    ? createTransport(SMTP_URL, { from: env().MAIL_FROM })
    : createTransport(
        { host: '127.0.0.1', port: MAIL_PORT, secure: false, ignoreTLS: true },
        { from: env().MAIL_FROM },
      );
  return transport;
}

/** Whether mail stays on this machine, where owners may read it in the app. */
export function mailStaysHere(): boolean {
  return env().SMTP_URL === undefined;
}

/** @throws when the server does not take the letter; the caller says so to whoever asked for it. */
export async function sendLetter(letter: Letter): Promise<void> {
  await outgoing().sendMail({ from: env().MAIL_FROM, ...letter });
  log().info({ subject: letter.subject }, 'letter handed over');
}
