import type { ReactNode } from 'react';
import { classes } from './classes';

const bars = {
  alarm: 'border-l-alarm',
  warn: 'border-l-warn',
  quiet: 'border-l-edge',
};

/** A thing to look at, with a bar at its left: alarm for what can be lost, warn for what wants looking at. */
export function Notice({
  tone,
  title,
  children,
  actions,
  role,
}: {
  tone: keyof typeof bars;
  title: ReactNode;
  children?: ReactNode;
  actions?: ReactNode;
  role?: 'alert' | 'status';
}) {
  return (
    <div
      role={role}
      className={classes(
        'flex flex-col gap-3 rounded-lg border border-l-4 border-line bg-sheet p-4 sm:flex-row sm:items-center sm:justify-between',
        bars[tone],
      )}
    >
      <div className="min-w-0">
        <p className={classes('text-[1.05rem] font-semibold', tone === 'alarm' && 'text-alarm')}>{title}</p>
        {children === undefined ? null : <div className="text-[0.95rem] text-soft">{children}</div>}
      </div>
      {actions === undefined ? null : <div className="flex shrink-0 flex-wrap gap-2">{actions}</div>}
    </div>
  );
}
