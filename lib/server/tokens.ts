import { createHash, randomBytes } from 'node:crypto';

/** 256 bits; shown once. Of a node's token and a program's key only the hash is kept. */
export function newToken(): string {
  return randomBytes(32).toString('base64url');
}

/** Hex SHA-256: enough for a token of full entropy, which no dictionary holds. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
