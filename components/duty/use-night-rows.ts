'use client';
import { useRouter } from 'next/navigation';
import { startTransition, useCallback, useEffect, useState, type MouseEvent } from 'react';
import { flushSync } from 'react-dom';
import { AT_ONCE } from './rows-at-once';

/** So many more whenever the browser has nothing else to do: some 10 ms of a slow phone. */
const AT_IDLE = 24;

/** Open a night without losing the page; whoever wants it elsewhere gets a plain link. */
export function useOpening(): (event: MouseEvent<HTMLAnchorElement>) => void {
  const router = useRouter();
  return useCallback(
    (event) => {
      if (event.metaKey || event.ctrlKey || event.shiftKey || event.altKey || event.button !== 0) return;
      event.preventDefault();
      const href = event.currentTarget.getAttribute('href') ?? '';
      startTransition(() => router.push(href));
    },
    [router],
  );
}

/** @returns how to call it off */
function whenIdle(work: () => void): () => void {
  // Safari has no idle callback
  if (typeof requestIdleCallback !== 'function') {
    const timer = setTimeout(work, 50);
    return () => clearTimeout(timer);
  }
  const handle = requestIdleCallback(work);
  return () => cancelIdleCallback(handle);
}

/** How many rows stand by now. All of them stand on paper, and for a search in the page, as soon as there was time. */
export function useGrowing(all: number): number {
  const [many, setMany] = useState(AT_ONCE);
  useEffect(() => {
    if (many >= all) return;
    const grow = () => startTransition(() => setMany((had) => had + AT_IDLE));
    const stop = whenIdle(grow);
    const forPaper = () => flushSync(() => setMany(all));
    addEventListener('beforeprint', forPaper);
    return () => {
      removeEventListener('beforeprint', forPaper);
      stop();
    };
  }, [many, all]);
  return Math.min(many, all);
}
