import { useId } from 'react';

/** How far something is, as a bar and in words. */
export function Meter({ label, part }: { label: string; part: number }) {
  const id = useId();
  const percent = Math.floor(part * 100);
  return (
    <div className="flex max-w-xl flex-col gap-1">
      <div className="flex justify-between text-[0.9rem] text-soft">
        <span id={id}>{label}</span>
        <span className="font-mono">{percent} %</span>
      </div>
      <progress
        aria-labelledby={id}
        value={percent}
        max={100}
        className="h-3 w-full appearance-none overflow-hidden rounded-sm border border-edge bg-faint [&::-moz-progress-bar]:bg-ink [&::-webkit-progress-bar]:bg-faint [&::-webkit-progress-value]:bg-ink"
      />
    </div>
  );
}
