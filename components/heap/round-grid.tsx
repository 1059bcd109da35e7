'use client';
import { useEffect, useRef, type KeyboardEvent } from 'react';
import { classes } from '@/components/ui/classes';
import { keyOf, type Place, type RoundDraft } from './round-draft';

/** The section as a grid of places, left to right and top to bottom; the one that is typed into is marked. */
export function RoundGrid({
  grid,
  draft,
  wrong,
  unit,
  onPlace,
  onKey,
}: {
  grid: { columns: number; rows: number };
  draft: RoundDraft;
  wrong: readonly string[];
  unit: string;
  onPlace: (place: Place) => void;
  onKey: (key: string) => void;
}) {
  const current = useRef<HTMLButtonElement>(null);
  const box = useRef<HTMLDivElement>(null);
  const here = keyOf(draft.place);
  // a keyboard types on in the next place; who presses the big keys keeps their finger there
  useEffect(() => {
    if (box.current?.contains(document.activeElement) === true) current.current?.focus();
  }, [here]);
  const rows = Array.from({ length: grid.rows }, (_, row) => row);
  const columns = Array.from({ length: grid.columns }, (_, column) => column);
  return (
    <div>
      <p className="pb-1 text-[0.9rem] text-soft">
        In {unit}, top to bottom, then the next column. Type, or press the keys below; a place that was not
        probed stays empty.
      </p>
      <div
        ref={box}
        role="group"
        aria-label="Places of the section"
        onKeyDown={(event) => typeKey(event, onKey)}
        className="grid gap-1.5"
        style={{ gridTemplateColumns: `1.5rem repeat(${grid.columns}, minmax(0, 1fr)) 1.5rem` }}
      >
        {rows.map((row) => [
          <Side key={`left ${row}`} text={row === 0 ? draft.section.left : ''} />,
          ...columns.map((column) => {
            const key = keyOf({ column, row });
            const text = draft.typed[key] ?? '';
            const isHere = key === here;
            const isWrong = wrong.includes(key);
            return (
              <button
                key={key}
                ref={isHere ? current : null}
                type="button"
                aria-pressed={isHere}
                aria-label={`Column ${column + 1}, row ${row + 1}: ${text === '' ? 'empty' : text}${isWrong ? ', not right' : ''}`}
                onClick={() => onPlace({ column, row })}
                className={classes(
                  'min-h-14 rounded-md border font-mono text-lg',
                  isHere ? 'border-2 border-ink bg-field' : 'border-edge bg-sheet hover:bg-faint',
                  isWrong && 'border-2 border-alarm text-alarm',
                )}
              >
                {text === '' ? <span className="text-soft">·</span> : text}
              </button>
            );
          }),
          <Side key={`right ${row}`} text={row === 0 ? draft.section.right : ''} />,
        ])}
      </div>
    </div>
  );
}

function Side({ text }: { text: string }) {
  return <span className="self-center truncate text-center text-[0.9rem] text-soft">{text}</span>;
}

function typeKey(event: KeyboardEvent, onKey: (key: string) => void): void {
  const key =
    event.key === 'Backspace'
      ? '⌫'
      : event.key === '-'
        ? '−'
        : event.key === ','
          ? '.'
          : event.key === 'Enter'
            ? 'Next'
            : event.key;
  if (!/^[\d.⌫−]$|^Next$/.test(key) || event.ctrlKey || event.metaKey || event.altKey) return;
  event.preventDefault();
  onKey(key);
}
