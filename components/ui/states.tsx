import type { ReactNode } from 'react';
import { classes } from './classes';

/** Nothing here yet: says what to do first. */
export function Empty({
  title,
  children,
  action,
}: {
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="rounded-lg border border-dashed border-edge p-6">
      <p className="font-serif text-xl font-semibold">{title}</p>
      {children === undefined ? null : <div className="mt-1 max-w-prose text-soft">{children}</div>}
      {action === undefined ? null : <div className="mt-4 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}

/** Something failed: what, what still works, what to do. */
export function Failed({
  title,
  children,
  action,
}: {
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div role="alert" className="rounded-lg border border-l-4 border-line border-l-alarm bg-sheet p-5">
      <p className="font-serif text-xl font-semibold">{title}</p>
      {children === undefined ? null : <div className="mt-1 max-w-prose text-soft">{children}</div>}
      {action === undefined ? null : <div className="mt-4 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}

/** Keeps the place of what is loading, so that nothing jumps. Give it the height of what will come. */
export function Skeleton({ className }: { className?: string }) {
  return <div aria-hidden="true" className={classes('breathe rounded-lg bg-faint', className)} />;
}
