'use client';
import type { KeyboardEvent } from 'react';
import { classes } from '@/components/ui/classes';
import { nightLabel } from '@/lib/units/time';
import { type Brush, keyStep, moved } from './brush';

const NAMES = {
  chosen: { first: 'First night chosen', last: 'Last night chosen' },
  other: { first: 'First night compared with', last: 'Last night compared with' },
} as const;

/** The chosen nights as a window over the bars, with an end at either side that is a slider for the keyboard. */
export function BrushEnds({
  which,
  brush,
  nights,
  onMove,
  onDone,
}: {
  which: 'chosen' | 'other';
  brush: Brush | null;
  nights: string[];
  onMove: (which: 'chosen' | 'other', brush: Brush) => void;
  onDone: (isKey: boolean) => void;
}) {
  const count = nights.length;
  // without a choice of their own, all nights are chosen; the other nights stand only where somebody asked for them
  if (brush === null && which === 'other') return null;
  const shown = brush ?? { first: 0, last: count - 1 };
  const [left, right] = [(100 * shown.first) / count, (100 * (shown.last + 1)) / count];
  const onKey = (handle: 'first' | 'last') => (event: KeyboardEvent) => {
    const step = keyStep(event.key, count);
    if (step === null || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    const next = moved(shown, handle, step, count);
    if (next.first === shown.first && next.last === shown.last) return;
    onMove(which, next);
    onDone(true);
  };
  return (
    <>
      {brush === null ? null : (
        <>
          {which === 'chosen' ? (
            <>
              <Veil left={0} right={left} />
              <Veil left={right} right={100} />
            </>
          ) : null}
          <span
            aria-hidden="true"
            className={classes(
              'pointer-events-none absolute inset-y-0',
              which === 'chosen' ? 'border-y-2 border-ink' : 'border-y-2 border-dashed border-outdoors',
            )}
            style={{ left: `${left}%`, width: `${right - left}%` }}
          />
        </>
      )}
      {(['first', 'last'] as const).map((handle) => {
        const place = shown[handle];
        return (
          <span
            key={handle}
            role="slider"
            tabIndex={0}
            aria-label={NAMES[which][handle]}
            aria-valuemin={0}
            aria-valuemax={count - 1}
            aria-valuenow={place}
            aria-valuetext={nightLabel(nights[place] ?? '')}
            onKeyDown={onKey(handle)}
            className={classes(
              'absolute inset-y-0 flex w-6 cursor-ew-resize items-center',
              handle === 'first' ? '-translate-x-1 justify-start' : '-translate-x-5 justify-end',
              brush === null && 'opacity-60',
            )}
            style={{ left: `${handle === 'first' ? left : right}%` }}
          >
            <span
              aria-hidden="true"
              className={classes('h-full w-[3px]', which === 'chosen' ? 'bg-ink' : 'bg-outdoors')}
            />
          </span>
        );
      })}
    </>
  );
}

/** Over the nights that are not chosen: they stay to be seen, and to be drawn over. */
function Veil({ left, right }: { left: number; right: number }) {
  if (right - left < 0.01) return null;
  return (
    <span
      aria-hidden="true"
      className="pointer-events-none absolute inset-y-0 bg-paper/70"
      style={{ left: `${left}%`, width: `${right - left}%` }}
    />
  );
}
