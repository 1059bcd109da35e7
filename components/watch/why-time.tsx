'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { TextField } from '@/components/ui/field';
import { fromLocal, toLocal } from '@/lib/units/local-time';
import { becauseInstant } from '@/lib/wording/instants';
import { useHouse } from './live-house';

/** Another moment: the switching before or after, or any time of the house's clock. */
export function WhyTime({
  at,
  earlier,
  later,
  onAsk,
}: {
  at: number | null;
  earlier: string | null;
  later: string | null;
  onAsk: (at: number | null) => void;
}) {
  const { house, scene } = useHouse();
  const now = at === null ? scene.now : Math.max(at, scene.now);
  const [typed, setTyped] = useState(() => toLocal(at ?? scene.now, house.zone));
  const [isOpen, setIsOpen] = useState(false);
  const [fault, setFault] = useState<string | undefined>();
  const [before, after] = [becauseInstant(earlier), becauseInstant(later)];
  return (
    <div className="sticky -bottom-5 -mx-5 -mb-5 flex flex-col gap-3 border-t border-line bg-sheet px-5 py-3">
      {isOpen ? (
        <form
          className="grid grid-cols-[minmax(0,1fr)_auto] items-end gap-2"
          onSubmit={(event) => {
            event.preventDefault();
            const asked = fromLocal(typed, house.zone);
            if (asked === null) return setFault('Give a day and a time.');
            if (asked > now + 60_000) return setFault('That is yet to come.');
            setFault(undefined);
            onAsk(asked);
          }}
        >
          <TextField
            type="datetime-local"
            label="Why was it so at"
            value={typed}
            error={fault}
            max={toLocal(now, house.zone)}
            onChange={(event) => setTyped(event.target.value)}
          />
          <Button type="submit">Ask</Button>
          {at === null ? null : (
            <Button kind="quiet" className="col-span-2 justify-self-start" onClick={() => onAsk(null)}>
              Back to now
            </Button>
          )}
        </form>
      ) : null}
      <div className="grid grid-cols-3 gap-2">
        <Button disabled={before === null} onClick={() => onAsk(before)} className="px-2 whitespace-normal">
          Earlier
          <span className="sr-only"> switching</span>
        </Button>
        <Button
          aria-expanded={isOpen}
          onClick={() => setIsOpen((open) => !open)}
          className="px-2 whitespace-normal"
        >
          Other time
        </Button>
        <Button disabled={after === null} onClick={() => onAsk(after)} className="px-2 whitespace-normal">
          Later
          <span className="sr-only"> switching</span>
        </Button>
      </div>
    </div>
  );
}
