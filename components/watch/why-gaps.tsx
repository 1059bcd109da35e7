import { gapLines, gapNowWords, gapsOverWords, type Gap } from '@/lib/wording/why-gaps';
import type { Scene } from '@/lib/wording/scene';

interface Gaps {
  gaps: readonly Gap[];
  scene: Scene;
}

/** Above the answer, for it makes the answer an old one. */
export function GapNow({ gaps, scene }: Gaps) {
  const words = gapNowWords(gaps, scene);
  return words === null ? null : (
    <p className="border-l-4 border-warn pl-3 font-semibold text-warn">{words}</p>
  );
}

/** Under the answer, in one line: what is over is part of the story and not the first thing to read. */
export function GapsOver({ gaps, scene, isPast }: Gaps & { isPast: boolean }) {
  const words = gapsOverWords(gaps, scene, isPast);
  const lines = gapLines(gaps, scene);
  if (words === null) return null;
  return (
    <div className="border-l-4 border-warn pl-3">
      <p className="font-semibold text-warn">{words}</p>
      {lines.length === 0 ? null : (
        <details>
          <summary className="flex min-h-11 cursor-pointer items-center text-soft underline underline-offset-4 hover:text-ink">
            All {lines.length} times
          </summary>
          <ol className="pb-2 text-soft tabular-nums">
            {lines.map((line, place) => (
              <li key={`${place} ${line}`} className="py-1">
                {line}
              </li>
            ))}
          </ol>
        </details>
      )}
    </div>
  );
}
