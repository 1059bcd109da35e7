'use client';
import { useEffect, useState } from 'react';

export interface Polled<Answer> {
  /** One a path, in their order; null until the first have come. */
  answers: Answer[] | null;
  isLost: boolean;
}

/** Asks the interface again and again while somebody looks; keeps the last answer where one fails, and says so. */
export function usePolled<Answer>(paths: readonly string[], everyMs: number): Polled<Answer> {
  const [told, setTold] = useState<{ of: string; answers: Answer[] } | null>(null);
  const [isLost, setLost] = useState(false);
  const wanted = paths.join(' ');
  useEffect(() => {
    if (wanted === '') return;
    let isGone = false;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const ask = async () => {
      try {
        const responses = await Promise.all(
          wanted
            .split(' ')
            .map((path) => fetch(`/api/v1${path}`, { headers: { accept: 'application/json' } })),
        );
        if (responses.some((one) => !one.ok)) throw new Error('refused');
        // the one shape on trust: our own interface, of the same release
        const answers = (await Promise.all(responses.map((one) => one.json()))) as Answer[];
        if (isGone) return;
        setTold({ of: wanted, answers });
        setLost(false);
      } catch {
        if (!isGone) setLost(true);
      }
      if (!isGone) timer = setTimeout(() => void ask(), everyMs);
    };
    void ask();
    return () => {
      isGone = true;
      clearTimeout(timer);
    };
  }, [wanted, everyMs]);
  return { answers: told !== null && told.of === wanted ? told.answers : null, isLost };
}
