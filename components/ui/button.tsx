import Link from 'next/link';
import type { ComponentProps } from 'react';
import { classes } from './classes';

export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'alarm';

const looks: Record<ButtonKind, string> = {
  primary: 'border-ink bg-ink text-paper hover:bg-ink/85 disabled:hover:bg-ink',
  plain: 'border-edge bg-sheet text-ink hover:bg-faint disabled:hover:bg-sheet',
  quiet: 'border-transparent bg-transparent text-ink underline underline-offset-4 hover:bg-faint',
  alarm: 'border-alarm bg-alarm text-paper hover:bg-alarm/85 disabled:hover:bg-alarm',
};

/** 44 px at least, for gloves; the label never breaks. */
const shape =
  'inline-flex min-h-11 min-w-11 items-center justify-center gap-2 rounded-lg border px-4 py-2 text-[0.95rem] font-semibold leading-tight whitespace-nowrap disabled:opacity-55 aria-disabled:opacity-55';

interface Own {
  kind?: ButtonKind;
  /** Something is under way: said to a screen reader, and no second press. */
  busy?: boolean;
}

export function Button({
  kind = 'plain',
  busy = false,
  className,
  disabled,
  children,
  ...rest
}: Own & ComponentProps<'button'>) {
  return (
    <button
      type="button"
      {...rest}
      disabled={disabled === true || busy}
      aria-busy={busy || undefined}
      className={classes(shape, looks[kind], className)}
    >
      {children}
      {busy ? (
        <span aria-hidden="true" className="breathe">
          …
        </span>
      ) : null}
    </button>
  );
}

export function ButtonLink({
  kind = 'plain',
  className,
  ...rest
}: Omit<Own, 'busy'> & ComponentProps<typeof Link>) {
  return <Link {...rest} className={classes(shape, looks[kind], className)} />;
}
