import Link from 'next/link';
import type { ComponentProps } from 'react';
import { type ButtonKind, buttonLook } from './button-look';

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
      className={buttonLook(kind, className)}
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
  return <Link {...rest} className={buttonLook(kind, className)} />;
}
