'use client';
import { createContext, use, useEffect, useState, type ReactNode } from 'react';

interface AppClock {
  /** App time when the server rendered, epoch ms. */
  now: number;
  /** App seconds a real second: a demonstration night runs at 60. */
  rate: number;
}
const Clock = createContext<AppClock>({ now: 0, rate: 1 });

/** App time for a page's parts. The first paint uses the server's instant, so that both renders say the same. */
export function ClockProvider({ now, rate, children }: AppClock & { children: ReactNode }) {
  return <Clock value={{ now, rate }}>{children}</Clock>;
}

/** App time, epoch ms, anew every `everyMs` real milliseconds. Counted on the monotonic clock, not the phone's. */
export function useAppNow(everyMs = 1000): number {
  const { now, rate } = use(Clock);
  const [shown, setShown] = useState(now);
  useEffect(() => {
    const began = performance.now();
    const timer = setInterval(() => setShown(now + (performance.now() - began) * rate), everyMs);
    return () => clearInterval(timer);
  }, [now, rate, everyMs]);
  return Math.max(shown, now);
}
