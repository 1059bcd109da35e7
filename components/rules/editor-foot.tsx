'use client';
import { Button } from '@/components/ui/button';

/** Save and put into force, always in reach at the foot of the form. */
export function EditorFoot({
  isAwake,
  isSubmitting,
  isDirty,
  failure,
  onForce,
}: {
  /** The page's script runs, so that a press does something. */
  isAwake: boolean;
  isSubmitting: boolean;
  isDirty: boolean;
  failure: string | null;
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
      <p role="alert" className="w-full font-semibold text-alarm empty:hidden">
        {failure}
      </p>
    </div>
  );
}
