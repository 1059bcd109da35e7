import { Phrases } from '@/components/ui/sentence';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import { interlockSentence, loopSentence } from '@/lib/wording/wiring-parts';
import type { SheetData } from './sheet-data';

/** Interlocks, high limits and loops: what keeps a load off, and which way the air goes. */
export function Limits({ data, preferences }: { data: SheetData; preferences: Preferences }) {
  const { channels, interlocks, loops, points, sources } = data;
  const label = (key: string) => channels.find((one) => one.key === key)?.label ?? key;
  const point = (key: string) => points.find((one) => one.key === key)?.name ?? key;
  const limits = channels.flatMap(({ key, label: name, highLimit, longestOn }) => [
    ...(highLimit === null
      ? []
      : [
          {
            key: `${key} high`,
            text: `${name}: off above ${temperature(highLimit.above, preferences)} at ${point(highLimit.point)}.`,
          },
        ]),
    ...(longestOn === null
      ? []
      : [{ key: `${key} long`, text: `${name}: on for ${exactly(longestOn)} without a break at most.` }]),
  ]);
  return (
    <>
      <section className="print:break-inside-avoid">
        <h2 className="font-semibold">Interlocks and limits</h2>
        {interlocks.length + limits.length === 0 ? (
          <p>None.</p>
        ) : (
          <ul className="flex list-disc flex-col gap-1 pl-5">
            {interlocks.map((one) => (
              <li key={one.id}>
                <Phrases
                  phrases={interlockSentence({
                    ...{ kind: one.kind, channel: label(one.channel), other: label(one.other) },
                    ...{ delayS: one.delay, frostMayBreak: one.frostMayBreak },
                  })}
                />
              </li>
            ))}
            {limits.map((one) => (
              <li key={one.key}>{one.text}</li>
            ))}
          </ul>
        )}
      </section>
      {loops.length === 0 ? null : (
        <section className="print:break-inside-avoid">
          <h2 className="font-semibold">Loops</h2>
          <ul className="flex list-disc flex-col gap-1 pl-5">
            {loops.map((one) => (
              <li key={one.id}>
                <Phrases
                  phrases={loopSentence({
                    channel: label(one.channel),
                    source: sources.find((source) => source.slug === one.source)?.name ?? one.source,
                    ...{ intake: point(one.intake), return: point(one.return) },
                  })}
                />
              </li>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
