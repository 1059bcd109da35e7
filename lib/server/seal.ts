import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { env } from './env';

/**
 * Answers that carry a token once are kept for 24 h so that a repeated request is answered alike; sealed, so that the
 * database and its backups hold no token that opens anything.
 */
function sealingKey(): Buffer {
  return Buffer.from(hkdfSync('sha256', env().AUTH_SECRET, '', 'middenward kept answers', 32));
}

export function seal(value: unknown): string {
  const iv = randomBytes(12);
  const cipher = createCipheriv('aes-256-gcm', sealingKey(), iv);
  const text = Buffer.concat([cipher.update(JSON.stringify(value), 'utf8'), cipher.final()]);
  return Buffer.concat([iv, cipher.getAuthTag(), text]).toString('base64');
}

/** @throws when it was sealed under another secret, or touched */
export function unseal(sealed: string): unknown {
  const bytes = Buffer.from(sealed, 'base64');
  const decipher = createDecipheriv('aes-256-gcm', sealingKey(), bytes.subarray(0, 12));
  decipher.setAuthTag(bytes.subarray(12, 28));
  return JSON.parse(Buffer.concat([decipher.update(bytes.subarray(28)), decipher.final()]).toString('utf8'));
}
