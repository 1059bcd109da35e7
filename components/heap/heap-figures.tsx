import { Figures, Panel } from '@/components/ui/panel';
import { WATCH_C } from '@/lib/analysis/heap-findings';
import { shrinkage } from '@/lib/analysis/heap-volume';
import { decimal, share, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { longDay } from '@/lib/wording/heap';
import type { HeapOnPage } from './heap-view-data';

/** The heap so far: hottest, how it sinks, what was done how often. */
export function HeapFigures({
  heap: { curve, coreFloor, entries },
  zone,
  preferences,
}: {
  heap: HeapOnPage;
  zone: string;
  preferences: Preferences;
}) {
  const first = curve[0];
  const built = entries.find((entry) => entry.kind === 'built');
  const since = entries.filter((entry) => built === undefined || entry.at >= built.at);
  const sizes = since.flatMap(({ at, volume }) =>
    volume === null ? [] : [{ at: Date.parse(at), volumeM3: volume }],
  );
  const sunk = shrinkage(
    sizes,
    since.filter((entry) => entry.kind === 'fed').map((entry) => Date.parse(entry.at)),
  );
  const count = (kind: string) => since.filter((entry) => entry.kind === kind).length;
  const hottest = first && curve.reduce((top, step) => (step.value > top.value ? step : top), first);
  return (
    <Panel title="The heap so far">
      <Figures
        rows={[
          ...(hottest === undefined
            ? []
            : [
                {
                  name: 'Hottest hour of the core',
                  value: `${temperature(hottest.value, preferences)}, ${longDay(hottest.at, zone)}`,
                  ...(hottest.value > WATCH_C ? { note: 'too hot: a heap may heat itself from there' } : {}),
                },
              ]),
          ...(coreFloor === null
            ? []
            : [{ name: 'Not drawn on under', value: temperature(coreFloor, preferences) }]),
          sunk === null
            ? {
                name: 'How it sinks',
                value: 'not known yet',
                note: 'give its size with two entries, and this tells',
              }
            : {
                name:
                  sunk.share < 0 ? 'Grown since it was measured first' : 'Sunk since it was measured first',
                value: `${share(Math.abs(sunk.share))}, ${decimal(sunk.first.volumeM3, 1)} to ${decimal(sunk.last.volumeM3, 1)} m³`,
                note: [
                  sunk.aWeek === null ? null : `${share(sunk.aWeek, 1)} a week`,
                  sunk.fedMeanwhile === 0
                    ? null
                    : `fed ${sunk.fedMeanwhile}× meanwhile, so it sank by more than that`,
                ]
                  .filter((part) => part !== null)
                  .join('; '),
              },
          { name: 'Fed', value: `${count('fed')}×` },
          { name: 'Watered', value: `${count('watered')}×` },
          { name: 'Turned', value: `${count('turned')}×` },
        ]}
      />
      {sizes.length < 3 ? null : (
        <details className="border-t border-line">
          <summary className="flex min-h-11 cursor-pointer items-center text-[0.9rem] text-soft underline underline-offset-4">
            Its size over time
          </summary>
          <Figures
            rows={sizes.map(({ at, volumeM3 }) => ({
              name: longDay(at, zone),
              value: `${decimal(volumeM3, 1)} m³`,
            }))}
          />
        </details>
      )}
    </Panel>
  );
}
