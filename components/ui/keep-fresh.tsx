'use client';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';

/**
 * Has the server render the page anew every so often while somebody looks at it. For pages that are read for minutes and
 * are no control panel; what must be seen within a second comes by the live feed. What is typed into forms stays.
 */
export function KeepFresh({ everyS }: { everyS: number }) {
  const router = useRouter();
  useEffect(() => {
    const timer = setInterval(() => {
      if (document.visibilityState === 'visible' && navigator.onLine) router.refresh();
    }, everyS * 1000);
    return () => clearInterval(timer);
  }, [router, everyS]);
  return null;
}
