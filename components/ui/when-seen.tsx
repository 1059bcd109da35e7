'use client';
import { useEffect, useRef, useState, type ReactNode } from 'react';

/** Shows what is costly to load only when it comes near the screen, or goes on paper. `instead` keeps its place. */
export function WhenSeen({ instead, children }: { instead: ReactNode; children: () => ReactNode }) {
  const place = useRef<HTMLDivElement>(null);
  const [isSeen, setSeen] = useState(false);
  useEffect(() => {
    const element = place.current;
    if (element === null || isSeen) return;
    const seen = () => setSeen(true);
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) seen();
      },
      { rootMargin: '200px' },
    );
    observer.observe(element);
    addEventListener('beforeprint', seen);
    return () => {
      observer.disconnect();
      removeEventListener('beforeprint', seen);
    };
  }, [isSeen]);
  return <div ref={place}>{isSeen ? children() : instead}</div>;
}
