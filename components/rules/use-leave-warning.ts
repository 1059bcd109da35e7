'use client';
import { useEffect, useState } from 'react';

/**
 * Holds back a link that would leave unsaved text behind. The browser's own question covers closing and reloading; Next
 * has no hook for links, so presses on them are caught before it sees them.
 * @returns where the reader wanted to go, and how to forget it
 */
export function useLeaveWarning(isDirty: boolean): { wanted: string | null; stay: () => void } {
  const [wanted, setWanted] = useState<string | null>(null);
  useEffect(() => {
    if (!isDirty) return;
    const onUnload = (event: BeforeUnloadEvent) => event.preventDefault();
    const onClick = (event: MouseEvent) => {
      if (event.button !== 0 || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey) return;
      const link = event.target instanceof Element ? event.target.closest('a[href]') : null;
      if (!(link instanceof HTMLAnchorElement) || link.target === '_blank' || link.hasAttribute('download'))
        return;
      const url = new URL(link.href);
      if (url.origin !== window.location.origin || url.pathname === window.location.pathname) return;
      event.preventDefault();
      event.stopPropagation();
      setWanted(url.pathname + url.search);
    };
    window.addEventListener('beforeunload', onUnload);
    document.addEventListener('click', onClick, true);
    return () => {
      window.removeEventListener('beforeunload', onUnload);
      document.removeEventListener('click', onClick, true);
    };
  }, [isDirty]);
  return { wanted, stay: () => setWanted(null) };
}
