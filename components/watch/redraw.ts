'use client';
import { useRouter } from 'next/navigation';
import { useEffect, useMemo, useRef } from 'react';

/** Has the server draw chart and figures anew: each minute of app time's worth, and soon after something switched. */
export function useRedraw(rate: number): () => void {
  const router = useRouter();
  const soon = useRef<ReturnType<typeof setTimeout>>(undefined);
  const redraw = useMemo(
    () => () => {
      clearTimeout(soon.current);
      soon.current = setTimeout(() => {
        if (document.visibilityState === 'visible') router.refresh();
      }, 800);
    },
    [router],
  );
  useEffect(() => {
    const timer = setInterval(redraw, Math.max(5000, 60_000 / rate));
    return () => clearInterval(timer);
  }, [redraw, rate]);
  return redraw;
}
