'use client';
import { Button } from '@/components/ui/button';

/** Asked before what was typed is lost. */
export function ThrowAway({
  className,
  onKeep,
  onThrow,
}: {
  className: string;
  onKeep: () => void;
  onThrow: () => void;
}) {
  return (
    <div className={className}>
      <p role="alert" className="w-full font-semibold">
        What you typed is not saved. Throw it away?
      </p>
      <Button autoFocus onClick={onKeep}>
        Go on typing
      </Button>
      <Button onClick={onThrow}>Throw away</Button>
    </div>
  );
}
