import { useId, type ComponentProps, type ReactNode } from 'react';
import { classes } from './classes';

export interface FieldOwn {
  label: ReactNode;
  /** A help that is always there: what the value does, or its form. */
  hint?: ReactNode;
  /** In words, what is wrong and what would be right. */
  error?: string | undefined;
  /** Unit, shown inside the field at its end. */
  unit?: string;
  /** Label for screen readers only, where a table's head already says it. */
  labelHidden?: boolean;
}

/** What the control inside must carry so that label, hint and error belong to it. */
export interface FieldLinks {
  id: string;
  'aria-invalid': true | undefined;
  'aria-describedby': string | undefined;
}

export const control =
  'min-h-11 w-full min-w-0 rounded-md border border-edge bg-field px-3 py-2 text-base text-ink placeholder:text-soft aria-invalid:border-alarm aria-invalid:outline-alarm disabled:bg-faint disabled:text-soft read-only:not-[select]:not-[[type=checkbox]]:bg-faint';

/**
 * Label above, control, hint, error below. For a control of your own hand in a function; it gets the links.
 * @example <Field label="Why">{(links) => <textarea {...links} />}</Field>
 */
export function Field({
  label,
  hint,
  error,
  labelHidden = false,
  className,
  children,
}: Omit<FieldOwn, 'unit'> & { className?: string | undefined; children: (links: FieldLinks) => ReactNode }) {
  const id = useId();
  const hintId = hint === undefined ? undefined : `${id}-hint`;
  const errorId = error === undefined ? undefined : `${id}-error`;
  return (
    <div className={classes('flex min-w-0 flex-col gap-1', className)}>
      <label htmlFor={id} className={labelHidden ? 'sr-only' : 'text-[0.9rem] text-soft'}>
        {label}
      </label>
      {children({
        id,
        'aria-invalid': error === undefined ? undefined : true,
        'aria-describedby': [errorId, hintId].filter(Boolean).join(' ') || undefined,
      })}
      {hint === undefined ? null : (
        <p id={hintId} className="text-[0.85rem] text-soft">
          {hint}
        </p>
      )}
      {error === undefined ? null : (
        <p id={errorId} className="text-[0.9rem] font-semibold text-alarm">
          {error}
        </p>
      )}
    </div>
  );
}

export function TextField({
  label,
  hint,
  error,
  unit,
  labelHidden,
  className,
  ...rest
}: FieldOwn & ComponentProps<'input'>) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden ?? false} className={className}>
      {(links) => (
        <span className="relative flex">
          <input
            type="text"
            autoComplete="off"
            {...rest}
            {...links}
            className={classes(control, unit !== undefined && 'pr-14')}
          />
          {unit === undefined ? null : (
            <span
              aria-hidden="true"
              className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-soft"
            >
              {unit}
            </span>
          )}
        </span>
      )}
    </Field>
  );
}

/**
 * A number is typed as text: `type=number` drops what it cannot read, and nothing typed may be lost. Read it with
 * `numberTyped` (lib/units/typed.ts), which takes a comma and a true minus too.
 */
export function NumberField({ label, unit, ...rest }: FieldOwn & ComponentProps<'input'>) {
  const named =
    unit === undefined ? (
      label
    ) : (
      <>
        {label}
        <span className="sr-only">, in {unit}</span>
      </>
    );
  return <TextField inputMode="decimal" {...rest} label={named} {...(unit === undefined ? {} : { unit })} />;
}

export function TextArea({
  label,
  hint,
  error,
  labelHidden,
  className,
  ...rest
}: Omit<FieldOwn, 'unit'> & ComponentProps<'textarea'>) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden ?? false} className={className}>
      {(links) => <textarea rows={3} {...rest} {...links} className={control} />}
    </Field>
  );
}

/** The browser's own list: on a phone it is the system's, large and known. */
export function Select({
  label,
  hint,
  error,
  labelHidden,
  className,
  children,
  ...rest
}: Omit<FieldOwn, 'unit'> & ComponentProps<'select'>) {
  return (
    <Field label={label} hint={hint} error={error} labelHidden={labelHidden ?? false} className={className}>
      {(links) => (
        <span className="relative flex">
          <select {...rest} {...links} className={classes(control, 'appearance-none pr-9')}>
            {children}
          </select>
          <svg
            aria-hidden="true"
            viewBox="0 0 10 6"
            className="pointer-events-none absolute right-3 top-1/2 w-2.5 -translate-y-1/2 fill-soft"
          >
            <path d="M0 0h10L5 6z" />
          </svg>
        </span>
      )}
    </Field>
  );
}
