'use client';
import { classes } from '@/components/ui/classes';
import type { Sense } from '@/lib/wording/heap-senses';

/** Big buttons for gloves; what a word means stands below once it is pressed, and pressed again it is taken back. */
export function SenseButtons<Word extends string>({
  legend,
  hint,
  senses,
  value,
  onChoose,
}: {
  legend: string;
  hint: string;
  senses: readonly Sense<Word>[];
  value: Word | null;
  onChoose: (word: Word | null) => void;
}) {
  const chosen = senses.find((one) => one.word === value);
  return (
    <fieldset>
      <legend className="pb-1 font-semibold">{legend}</legend>
      <p className="pb-1 text-[0.85rem] text-soft">{hint}</p>
      <div className="grid grid-cols-2 gap-2 sm:grid-cols-4 sm:has-[>:last-child:nth-child(3)]:grid-cols-3">
        {senses.map((one) => (
          <button
            key={one.word}
            type="button"
            aria-pressed={one.word === value}
            onClick={() => onChoose(one.word === value ? null : one.word)}
            className={classes(
              'min-h-14 rounded-lg border px-2 text-[0.95rem] font-semibold leading-tight',
              one.word === value ? 'border-ink bg-ink text-paper' : 'border-edge bg-sheet hover:bg-faint',
            )}
          >
            {one.label}
          </button>
        ))}
      </div>
      <p aria-live="polite" className="pt-1 text-[0.95rem] empty:hidden">
        {chosen === undefined ? null : (
          <>
            {chosen.means}{' '}
            {chosen.then === '' ? null : <strong className="font-semibold">{chosen.then}</strong>}
          </>
        )}
      </p>
    </fieldset>
  );
}
