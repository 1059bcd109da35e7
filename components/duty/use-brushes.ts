'use client';
import { useRouter } from 'next/navigation';
import { useEffect, useRef, useState, useTransition } from 'react';
import type { Brush } from './brush';

export interface Brushes {
  chosen: Brush | null;
  other: Brush | null;
}

/** A key that is held moves the brush many times; the page is asked once it was let go. */
const SETTLED_MS = 400;

/**
 * The brushes as they are being moved, and as the address has them: what is moved goes into the address when it is done,
 * and gives way to what the page then shows.
 * @param addressFor the address of the page with these brushes
 */
export function useBrushes(shown: Brushes, addressFor: (next: Brushes) => string) {
  const router = useRouter();
  const [isPending, startTransition] = useTransition();
  const key = JSON.stringify([shown.chosen, shown.other]);
  const [kept, setKept] = useState<{ over: string; brushes: Brushes } | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined);
  const latest = useRef<Brushes>(shown);
  const brushes = kept?.over === key ? kept.brushes : { chosen: shown.chosen, other: shown.other };
  useEffect(() => {
    latest.current = brushes;
  });
  useEffect(() => () => clearTimeout(timer.current), []);

  function draft(which: keyof Brushes, brush: Brush | null): void {
    const next = { ...latest.current, [which]: brush };
    latest.current = next;
    setKept({ over: key, brushes: next });
  }
  function go(): void {
    startTransition(() => router.replace(addressFor(latest.current), { scroll: false }));
  }
  /** @param isKey more may follow at once */
  function commit(isKey = false): void {
    clearTimeout(timer.current);
    if (isKey) timer.current = setTimeout(go, SETTLED_MS);
    else go();
  }
  return { brushes, draft, commit, isPending };
}
