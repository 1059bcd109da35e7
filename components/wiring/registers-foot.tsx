'use client';
import { Button } from '@/components/ui/button';
import { ThrowAway } from './throw-away';

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
    return <ThrowAway className="flex flex-wrap gap-2" onKeep={() => setLeaving(false)} onThrow={onClose} />;
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
