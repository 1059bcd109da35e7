import { useId, type ReactNode } from 'react';
import { classes } from './classes';

/** A sheet of paper on the page with a title; the title names it as a region. */
export function Panel({
  title,
  note,
  actions,
  children,
  className,
  level = 2,
}: {
  title: ReactNode;
  /** Beside the title, in the soft tone. */
  note?: ReactNode;
  actions?: ReactNode;
  children: ReactNode;
  className?: string;
  level?: 2 | 3;
}) {
  const id = useId();
  const Title = level === 2 ? 'h2' : 'h3';
  return (
    <section
      aria-labelledby={id}
      className={classes('min-w-0 rounded-lg border border-line bg-sheet p-4', className)}
    >
      <div className="mb-2 flex flex-wrap items-center justify-between gap-x-4 gap-y-1">
        <Title id={id} className="font-semibold">
          {title}
        </Title>
        {note === undefined ? null : <div className="text-[0.9rem] text-soft">{note}</div>}
        {actions === undefined ? null : <div className="flex flex-wrap gap-2">{actions}</div>}
      </div>
      {children}
    </section>
  );
}

/** Name and figure on one line, hairlines between: the night's figures, a source's figures. */
export function Figures({ rows }: { rows: { name: ReactNode; value: ReactNode; note?: ReactNode }[] }) {
  return (
    <dl className="divide-y divide-line border-t border-line">
      {rows.map((row, place) => (
        <div key={place} className="flex flex-wrap items-baseline justify-between gap-x-4 py-2">
          <dt>{row.name}</dt>
          <dd className="ml-auto text-right font-mono text-[0.95rem]">
            {row.value}
            {row.note === undefined ? null : (
              <span className="block font-sans text-[0.85rem] text-soft">{row.note}</span>
            )}
          </dd>
        </div>
      ))}
    </dl>
  );
}
