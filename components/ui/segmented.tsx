'use client';
import { classes } from './classes';

/** One of a few, all in sight, such as hand / off / auto. What is pressed may ask first, so it shows `value` only. */
export function Segmented<Value extends string>({
  label,
  options,
  value,
  onChoose,
  disabled = false,
  describedBy,
}: {
  label: string;
  options: readonly { value: Value; label: string }[];
  value: Value;
  onChoose: (value: Value) => void;
  disabled?: boolean;
  /** Id of the words that say why it is disabled. */
  describedBy?: string | undefined;
}) {
  return (
    <div
      role="group"
      aria-label={label}
      aria-describedby={describedBy}
      className="inline-flex rounded-lg border border-edge"
    >
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          disabled={disabled}
          onClick={() => onChoose(option.value)}
          className={classes(
            'min-h-11 min-w-14 border-r border-edge px-3 font-mono text-[0.95rem] first:rounded-l-md last:rounded-r-md last:border-r-0',
            option.value === value
              ? 'bg-ink text-paper'
              : 'bg-sheet text-ink enabled:hover:bg-faint disabled:text-soft',
          )}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
