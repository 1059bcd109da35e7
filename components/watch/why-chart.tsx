'use client';
import type { ReactNode } from 'react';
import { showWhy } from './why-address';

/** The chart, whose strips can be pressed to ask why at that time. By keyboard the channel's own button asks the same. */
export function WhyChart({
  night,
  now,
  children,
}: {
  night: { from: number; to: number };
  now: number;
  children: ReactNode;
}) {
  return (
    <div
      onClick={(event) => {
        const strip = event.target instanceof Element ? event.target.closest('[data-strip]') : null;
        const channel = strip?.getAttribute('data-strip');
        if (strip === null || channel === null || channel === undefined) return;
        const { left, width } = strip.getBoundingClientRect();
        const at = night.from + ((event.clientX - left) / width) * (night.to - night.from);
        // to the right of now is now
        showWhy({ channel, at: at >= now ? null : Math.round(at) });
      }}
    >
      {children}
      <p className="text-[0.85rem] text-soft">Press a strip to ask why it ran at that time, or why not.</p>
    </div>
  );
}
