import { useId, type ComponentProps, type ReactNode } from 'react';
import { classes } from './classes';

interface Own {
  label: ReactNode;
  hint?: ReactNode;
  error?: string | undefined;
}

function Beside({
  label,
  hint,
  error,
  className,
  children,
}: Own & { className?: string | undefined; children: (described: string | undefined) => ReactNode }) {
  const id = useId();
  const described = [error === undefined ? '' : `${id}-error`, hint === undefined ? '' : `${id}-hint`]
    .filter(Boolean)
    .join(' ');
  return (
    <div className={className}>
      {/* the whole line can be pressed, not only the small square */}
      <label className="flex min-h-11 cursor-pointer items-center gap-3 py-1.5 has-disabled:cursor-not-allowed has-disabled:text-soft">
        {children(described || undefined)}
        <span>{label}</span>
      </label>
      {hint === undefined ? null : (
        <p id={`${id}-hint`} className="ml-8 text-[0.85rem] text-soft">
          {hint}
        </p>
      )}
      {error === undefined ? null : (
        <p id={`${id}-error`} className="ml-8 text-[0.9rem] font-semibold text-alarm">
          {error}
        </p>
      )}
    </div>
  );
}

export function Checkbox({
  label,
  hint,
  error,
  className,
  ...rest
}: Own & Omit<ComponentProps<'input'>, 'type'>) {
  return (
    <Beside label={label} hint={hint} error={error} className={className}>
      {(described) => (
        <input
          {...rest}
          type="checkbox"
          aria-describedby={described}
          aria-invalid={error === undefined ? undefined : true}
          className="size-5 shrink-0 accent-ink"
        />
      )}
    </Beside>
  );
}

/** For what acts at once; a choice that waits for a Save button is a Checkbox. */
export function Switch({
  label,
  hint,
  error,
  className,
  ...rest
}: Own & Omit<ComponentProps<'input'>, 'type' | 'role'>) {
  return (
    <Beside label={label} hint={hint} error={error} className={className}>
      {(described) => (
        <span className="relative inline-flex h-6 w-10 shrink-0">
          <input
            {...rest}
            type="checkbox"
            role="switch"
            aria-describedby={described}
            className={classes(
              'peer size-full appearance-none rounded-full border border-edge bg-faint checked:border-ink checked:bg-ink',
            )}
          />
          <span
            aria-hidden="true"
            className="pointer-events-none absolute left-1 top-1 size-4 rounded-full bg-ink transition-transform peer-checked:translate-x-4 peer-checked:bg-paper"
          />
        </span>
      )}
    </Beside>
  );
}
