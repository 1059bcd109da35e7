'use client';
import { Button } from '@/components/ui/button';
import { counted } from '@/lib/wording/counts';

/** Save and put into force, always in reach at the foot of the form. */
export function EditorFoot({
  isAwake,
  isSubmitting,
  isDirty,
  failure,
  toLookAt,
  onForce,
}: {
  /** The page's script runs, so that a press does something. */
  isAwake: boolean;
  isSubmitting: boolean;
  isDirty: boolean;
  failure: string | null;
  /** How many things the check found; on a phone they stand far below. */
  toLookAt: number;
  onForce: () => void;
}) {
  return (
    <div className="sticky bottom-14 flex flex-wrap items-center gap-2 rounded-b-lg border-t border-line bg-sheet p-4 lg:bottom-0">
      <Button kind="primary" disabled={!isAwake} onClick={onForce}>
        Put into force…
      </Button>
      <Button type="submit" disabled={!isAwake} busy={isSubmitting}>
        Save draft
      </Button>
      <p role="status" className="text-[0.9rem] text-soft">
        {isDirty ? 'Not saved yet' : ''}
      </p>
      {toLookAt === 0 ? null : (
        <a
          href="#look-at"
          className="inline-flex min-h-11 items-center text-[0.9rem] text-warn underline underline-offset-4 xl:hidden"
        >
          {counted(toLookAt, 'thing to look at', 'things to look at')}
        </a>
      )}
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
