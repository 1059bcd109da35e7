import { env } from './env';
import { Problem } from './errors';

/**
 * How often something was tried of late, by whom. In memory: there is one web process, and a restart forgets a minute.
 * Real time, as everything that guards a door.
 */
const WINDOW_MS = 60_000;
/** Above it the oldest tries are dropped, so that made-up names cannot fill the memory. */
const MOST_NAMES = 50_000;

// A bundler may load this module twice in one process; the counts stay one.
const kept = globalThis as { middenwardTries?: Map<string, number[]> };
const tries = (kept.middenwardTries ??= new Map<string, number[]>());

/**
 * Counts a try for each name. @throws Problem `too-many`, with the seconds to wait, when one of them has had its share of
 * the minute; a refused try does not count.
 */
export function countTry(names: string[], limit = env().SIGN_IN_LIMIT, now = Date.now()): void {
  for (const name of names) {
    const recent = (tries.get(name) ?? []).filter((at) => now - at < WINDOW_MS);
    const oldest = recent[recent.length - limit];
    if (oldest !== undefined) {
      const wait = Math.max(1, Math.ceil((oldest + WINDOW_MS - now) / 1000));
      throw new Problem('too-many', {
        detail: `Too many tries; wait ${wait} s.`,
        headers: { 'retry-after': String(wait) },
      });
    }
  }
  for (const name of names) {
    const recent = (tries.get(name) ?? []).filter((at) => now - at < WINDOW_MS);
    tries.delete(name); // to the end: the map's order is that of the last try
    tries.set(name, [...recent, now]);
  }
  for (const name of tries.keys()) {
    if (tries.size <= MOST_NAMES) break;
    tries.delete(name);
  }
}

/** The asker's address, as the door set it over whatever the client sent. */
export function addressOf(headers: Headers): string {
  return headers.get('x-forwarded-for')?.split(',')[0]?.trim() ?? 'unknown';
}
