'use client';
import { age } from '@/lib/units/time';
import { useAppNow } from './clock';

/** "3 s ago", counted on. `at` is epoch ms of app time. */
export function Age({ at, before = '' }: { at: number; before?: string }) {
  const now = useAppNow();
  return (
    <time dateTime={new Date(at).toISOString()}>
      {before}
      {age(now - at)}
    </time>
  );
}
