'use client';
import {
  createContext,
  use,
  useEffect,
  useLayoutEffect,
  useRef,
  useState,
  type ReactNode,
  type RefObject,
} from 'react';

interface AppClock {
  /** App time when the server rendered, epoch ms. */
  now: number;
  /** App seconds a real second: a demonstration night runs at 60. */
  rate: number;
  /** Monotonic ms of this browser when that `now` arrived. */
  arrived: RefObject<number | null>;
}
const Clock = createContext<AppClock>({ now: 0, rate: 1, arrived: { current: null } });

/** App time for a page's parts. The first paint uses the server's instant, so that both renders say the same. */
export function ClockProvider({ now, rate, children }: { now: number; rate: number; children: ReactNode }) {
  const arrived = useRef<number | null>(null);
  // before the effects of what is inside, which read it
  useLayoutEffect(() => {
    arrived.current = performance.now();
  }, [now]);
  return <Clock value={{ now, rate, arrived }}>{children}</Clock>;
}

/** App time, epoch ms, anew every `everyMs` real milliseconds. Counted on the monotonic clock, not the phone's. */
export function useAppNow(everyMs = 1000): number {
  const { now, rate, arrived } = use(Clock);
  const [shown, setShown] = useState(now);
  useEffect(() => {
    const read = () => setShown(now + (performance.now() - (arrived.current ?? performance.now())) * rate);
    read();
    const timer = setInterval(read, everyMs);
    return () => clearInterval(timer);
  }, [now, rate, arrived, everyMs]);
  return Math.max(shown, now);
}
