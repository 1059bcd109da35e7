/**
 * What the book needs to be written in without a line: which heaps there are, and how the reader reads. Kept from the last
 * visit, for one person at a time; gone when they sign out. No figures and no entries.
 */
import type { Section } from '@/lib/analysis/probe-section';
import type { Preferences } from '@/lib/units/preferences';

export interface BookHouse {
  slug: string;
  name: string;
  zone: string;
  heaps: { slug: string; name: string; section: Section | null }[];
}

export interface BookFacts {
  owner: string;
  person: string;
  preferences: Preferences;
  house: BookHouse;
}

export interface KeptBook {
  owner: string;
  person: string;
  preferences: Preferences;
  houses: BookHouse[];
}

const KEY = 'middenward.heap-book';
const WORKER = '/heap-book-worker.js';

export function rememberBook({ owner, person, preferences, house }: BookFacts): void {
  const before = keptBook();
  const others = before?.owner === owner ? before.houses.filter((one) => one.slug !== house.slug) : [];
  const kept: KeptBook = { owner, person, preferences, houses: [house, ...others] };
  try {
    localStorage.setItem(KEY, JSON.stringify(kept));
  } catch {
    return; // a full or forbidden store: the book then needs its line
  }
  void readyWorker();
}

export function keptBook(): KeptBook | null {
  try {
    const text = localStorage.getItem(KEY);
    // written above and nowhere else, by this release or an older one of the same shape
    return text === null ? null : (JSON.parse(text) as KeptBook);
  } catch {
    return null;
  }
}

/** Signing out, and whoever signs in next, find nothing of the one before. */
export function forgetBook(): void {
  try {
    localStorage.removeItem(KEY);
  } catch {
    return; // nothing could be kept there either
  }
}

/** The worker keeps the page's shell and serves it where the network does not; browsers allow it over HTTPS only. */
async function readyWorker(): Promise<void> {
  if (!('serviceWorker' in navigator)) return;
  try {
    await navigator.serviceWorker.register(WORKER, { scope: '/' });
    const ready = await navigator.serviceWorker.ready;
    ready.active?.postMessage('look-for-new');
  } catch {
    return; // without it the open page still queues what is written
  }
}
