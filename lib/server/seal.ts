import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { env } from './env';

/**
 * What each kind of sealed text is for, with a key of its own. Answers that carry a token once are kept for 24 h so that
 * a repeated request is answered alike; passwords of brokers are needed in clear at each connection. Sealed, so that the
 * database and its backups hold nothing that opens anything.
 */
const USES = { answers: 'middenward kept answers', brokers: 'middenward passwords of brokers' } as const;
type Use = keyof typeof USES;

function sealingKey(use: Use): Buffer {
  return Buffer.from(hkdfSync('sha256', env().AUTH_SECRET, '', USES[use], 32));
}

export function seal(value: unknown, use: Use = 'answers'): string {
  const iv = randomBytes(12);
  const cipher = createCipheriv('aes-256-gcm', sealingKey(use), iv);
  const text = Buffer.concat([cipher.update(JSON.stringify(value), 'utf8'), cipher.final()]);
  return Buffer.concat([iv, cipher.getAuthTag(), text]).toString('base64');
}

/** @throws when it was sealed under another secret, or touched */
export function unseal(sealed: string, use: Use = 'answers'): unknown {
  const bytes = Buffer.from(sealed, 'base64');
  const decipher = createDecipheriv('aes-256-gcm', sealingKey(use), bytes.subarray(0, 12));
  decipher.setAuthTag(bytes.subarray(12, 28));
  return JSON.parse(Buffer.concat([decipher.update(bytes.subarray(28)), decipher.final()]).toString('utf8'));
}
