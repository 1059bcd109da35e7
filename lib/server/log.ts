import { pino, type Logger } from 'pino';
import { env } from './env';

let made: Logger | undefined;

/** Structured lines on standard output; what could be a secret is cut out wherever it stands. */
export function log(): Logger {
  made ??= pino({
    level: env().LOG_LEVEL,
    base: { part: process.argv[1]?.includes('worker') === true ? 'worker' : 'web' },
    redact: {
      paths: [
        'password',
        'token',
        'key',
        '*.password',
        '*.token',
        '*.newPassword',
        'headers.cookie',
        'headers.authorization',
      ],
      censor: '(cut out)',
    },
  });
  return made;
}
