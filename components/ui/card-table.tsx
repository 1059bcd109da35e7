import type { ComponentProps, ReactNode } from 'react';
import { classes } from './classes';

export interface CardColumn {
  key: string;
  label: string;
  /** Figures stand right where there is room, in the mono face; their unit belongs in the label. */
  figure?: boolean;
  labelHidden?: boolean;
}

/**
 * A table where there is room; on a phone a card for each row, each cell behind its column's label, so that nothing must
 * be scrolled to sideways. What is laid out as a block is no table to a screen reader any more, hence the roles in words.
 */
export function CardTable({
  caption,
  columns,
  children,
}: {
  /** Read out only: the panel's title is what is seen. */
  caption: string;
  columns: readonly CardColumn[];
  children: ReactNode;
}) {
  return (
    <div
      tabIndex={0}
      role="group"
      aria-label={caption}
      // relative: what is read out only is placed absolutely, and would else widen the page
      className="relative overflow-x-auto"
    >
      <table role="table" className="w-full border-collapse text-[0.95rem] max-sm:block">
        <caption className="sr-only">{caption}</caption>
        <thead role="rowgroup" className="max-sm:sr-only">
          <tr role="row" className="border-b border-line">
            {columns.map((column) => (
              <th
                key={column.key}
                role="columnheader"
                scope="col"
                className={classes(
                  'px-2 py-2 align-bottom text-[0.85rem] font-semibold text-soft',
                  column.figure === true ? 'text-right' : 'text-left',
                )}
              >
                <span className={column.labelHidden === true ? 'sr-only' : undefined}>{column.label}</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody role="rowgroup" className="max-sm:block">
          {children}
        </tbody>
      </table>
    </div>
  );
}

export function CardRow({ className, ...rest }: ComponentProps<'tr'>) {
  return (
    <tr
      role="row"
      {...rest}
      className={classes(
        'border-b border-line last:border-0 max-sm:flex max-sm:flex-col max-sm:py-3',
        className,
      )}
    />
  );
}

/** Names the row; a card begins with it, wherever it stands among the columns. */
export function CardRowHead({ className, ...rest }: ComponentProps<'th'>) {
  return (
    <th
      role="rowheader"
      scope="row"
      {...rest}
      className={classes(
        'px-2 py-2.5 text-left align-top font-semibold max-sm:order-first max-sm:py-1',
        className,
      )}
    />
  );
}

/** One value. On a card it stands behind `term`, its column's label; without one it takes the whole width. */
export function CardCell({
  term,
  figure = false,
  className,
  children,
  ...rest
}: ComponentProps<'td'> & { term?: string | undefined; figure?: boolean }) {
  return (
    <td
      role="cell"
      data-term={term}
      {...rest}
      className={classes(
        'px-2 py-2.5 align-top max-sm:py-1',
        figure && 'whitespace-nowrap text-right font-mono max-sm:text-left max-sm:whitespace-normal',
        term !== undefined && 'card-term',
        className,
      )}
    >
      <div className="min-w-0">{children}</div>
    </td>
  );
}
