'use client';
import { Button } from '@/components/ui/button';

/** Save or leave; what was typed is not thrown away without being asked about. */
export function RegistersFoot({
  isLeaving,
  isBusy,
  save,
  leave,
  setLeaving,
  onClose,
}: {
  isLeaving: boolean;
  isBusy: boolean;
  save: () => void;
  leave: () => void;
  setLeaving: (leaving: boolean) => void;
  onClose: () => void;
}) {
  if (isLeaving) {
    return (
      <div className="flex flex-wrap gap-2">
        <p role="alert" className="w-full font-semibold">
          What you typed is not saved. Throw it away?
        </p>
        <Button autoFocus onClick={() => setLeaving(false)}>
          Go on typing
        </Button>
        <Button onClick={onClose}>Throw away</Button>
      </div>
    );
  }
  return (
    <div className="flex flex-wrap gap-2">
      <Button kind="primary" busy={isBusy} onClick={save}>
        Save
      </Button>
      <Button onClick={leave}>Leave as it is</Button>
    </div>
  );
}
