import type { ComponentProps, ReactNode } from 'react';
import { classes } from './classes';

export interface Column {
  key: string;
  label: ReactNode;
  /** Figures stand right, in the mono face; their unit belongs in the label. */
  figure?: boolean;
  labelHidden?: boolean;
  /** Left out on a phone: what is said elsewhere on the row already. */
  wideOnly?: boolean;
  /** Where pressing the head sorts; the address carries the order, so it survives a reload. */
  sort?: { href: string; order: 'ascending' | 'descending' | null };
}

/** Scrolls sideways by itself, never the page; it can then be focused, so that arrow keys scroll it. */
export function Table({
  caption,
  captionHidden = false,
  columns,
  children,
  foot,
}: {
  caption: ReactNode;
  captionHidden?: boolean;
  columns: Column[];
  children: ReactNode;
  foot?: ReactNode;
}) {
  return (
    <div
      tabIndex={0}
      role="group"
      aria-label={typeof caption === 'string' ? caption : 'Table'}
      // relative: what is read out only is placed absolutely, and would else widen the page
      className="relative overflow-x-auto"
    >
      <table className="w-full border-collapse text-[0.95rem]">
        <caption className={captionHidden ? 'sr-only' : 'pb-2 text-left font-semibold'}>{caption}</caption>
        <thead>
          <tr className="border-b border-line">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                aria-sort={column.sort === undefined ? undefined : (column.sort.order ?? 'none')}
                className={classes(
                  'px-2 py-2 align-bottom text-[0.85rem] font-semibold text-soft',
                  column.figure === true ? 'text-right' : 'text-left',
                  column.wideOnly === true && 'max-sm:hidden',
                )}
              >
                {column.sort === undefined ? (
                  <span className={column.labelHidden === true ? 'sr-only' : undefined}>{column.label}</span>
                ) : (
                  <a
                    href={column.sort.href}
                    className="inline-flex min-h-11 items-center gap-1 underline underline-offset-4"
                  >
                    {column.label}
                    <span aria-hidden="true">
                      {column.sort.order === 'ascending'
                        ? '↑'
                        : column.sort.order === 'descending'
                          ? '↓'
                          : ''}
                    </span>
                  </a>
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>{children}</tbody>
        {foot === undefined ? null : <tfoot className="border-t-2 border-edge font-semibold">{foot}</tfoot>}
      </table>
    </div>
  );
}

export function Row({ className, ...rest }: ComponentProps<'tr'>) {
  return <tr {...rest} className={classes('border-b border-line last:border-0', className)} />;
}

/** First cell of a row: it names the row. */
export function RowHead({ className, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      scope="row"
      {...rest}
      className={classes('px-2 py-2.5 text-left align-top font-semibold', className)}
    />
  );
}

export function Cell({
  figure = false,
  wideOnly = false,
  className,
  ...rest
}: ComponentProps<'td'> & { figure?: boolean; wideOnly?: boolean }) {
  return (
    <td
      {...rest}
      className={classes(
        'px-2 py-2.5 align-top',
        figure && 'whitespace-nowrap text-right font-mono',
        wideOnly && 'max-sm:hidden',
        className,
      )}
    />
  );
}
