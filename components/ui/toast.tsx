'use client';
import { useSyncExternalStore } from 'react';

interface Said {
  id: number;
  text: string;
}
let said: readonly Said[] = [];
const none: readonly Said[] = [];
let nextId = 1;
const listeners = new Set<() => void>();

function set(next: readonly Said[]): void {
  said = next;
  for (const listener of listeners) listener();
}

/** More would cover what is being worked at: five points are added in half a minute. */
const AT_ONCE = 2;

/** Says that something was done: shown for 6 s and read out. Not for failures: these stay beside what failed. */
export function say(text: string): void {
  const id = nextId++;
  set([...said, { id, text }].slice(-AT_ONCE));
  setTimeout(() => set(said.filter((one) => one.id !== id)), 6000);
}

/** Stands once, in the shell: a live region must be there before its words are. */
export function Toasts() {
  const now = useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => said,
    () => none,
  );
  return (
    <div
      role="status"
      aria-live="polite"
      className="not-on-paper pointer-events-none fixed inset-x-3 bottom-20 z-50 flex flex-col items-center gap-2 lg:bottom-6"
    >
      {now.map((one) => (
        <p key={one.id} className="rounded-lg bg-ink px-4 py-3 text-paper shadow-lg">
          {one.text}
        </p>
      ))}
    </div>
  );
}
