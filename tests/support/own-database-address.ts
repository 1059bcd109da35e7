// The database of the running test file, for a test that opens connections of its own.
import { inject } from 'vitest';
import { inDatabase } from './clone';

/** As the app's role. */
export function appUrl(): string {
  return process.env['DATABASE_URL'] ?? '';
}

/** As the owner of the tables, whom row-level security does not keep out unless it is forced. */
export function ownerUrl(): string {
  return inDatabase(inject('cluster').ownerUrl, new URL(appUrl()).pathname.slice(1));
}
