import { ButtonLink } from '@/components/ui/button';
import { Figures, Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import { TabLinks } from '@/components/ui/tabs';
import type { CoreTrend } from '@/lib/analysis/core';
import type { HeapEntry } from '@/lib/schema/heap-view';
import { temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { HEAP_KINDS, HOT_CORE_C, heapSentence, longDay } from '@/lib/wording/heap';
import { Book } from './book';
import { CoreCurve } from './core-curve';
import { EntryButton } from './entry-button';

export interface HeapViewData {
  heaps: { slug: string; name: string }[];
  heap: { slug: string; name: string } | null;
  coreFloor: number | null;
  hasCorePoint: boolean;
  core: { value: number; at: number } | null;
  trend: CoreTrend | null;
  entries: HeapEntry[];
  curve: { at: number; value: number }[];
}

export function HeapView({
  house,
  data,
  allowed,
  preferences,
  now,
}: {
  house: { slug: string; name: string; zone: string };
  data: HeapViewData;
  allowed: readonly string[];
  preferences: Preferences;
  now: number;
}) {
  const { heap, entries } = data;
  if (heap === null) return <NoHeap house={house} />;
  const { slug, zone } = house;
  const mayWrite = allowed.includes('heap.write');
  const standing = { ...data, name: heap.name, zone, now };
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={heapSentence(standing, preferences)} before="Heap book" />
      {data.heaps.length < 2 ? null : (
        <TabLinks
          label="Heaps"
          links={data.heaps.map((one) => ({
            href: `/${slug}/heap-book?heap=${one.slug}`,
            label: one.name,
            current: one.slug === heap.slug,
          }))}
        />
      )}
      {mayWrite ? (
        <div className="not-on-paper flex flex-wrap gap-2">
          {HEAP_KINDS.map(({ kind, label }, place) => (
            <EntryButton
              key={kind}
              house={slug}
              heap={heap.slug}
              zone={zone}
              kind={kind}
              look={place === 0 ? 'primary' : 'plain'}
            >
              {label}
            </EntryButton>
          ))}
        </div>
      ) : (
        <p className="text-soft">Growers and owners write in this book; you can read it.</p>
      )}
      <div className="grid gap-5 lg:grid-cols-[minmax(0,1.35fr)_minmax(0,1fr)] lg:items-start">
        <div className="flex min-w-0 flex-col gap-5">
          <Panel title="Core, and what was done">
            {data.hasCorePoint ? (
              <CoreCurve
                curve={data.curve}
                marks={entries
                  .filter((entry) => entry.kind !== 'note')
                  .map((entry) => ({ at: Date.parse(entry.at), kind: entry.kind }))
                  .reverse()}
                floor={data.coreFloor}
                zone={zone}
                preferences={preferences}
              />
            ) : (
              <p className="text-soft">
                No probe is named as this heap’s core. Name one on Wiring, under sources.
              </p>
            )}
          </Panel>
          <CoreFigures data={data} zone={zone} preferences={preferences} />
        </div>
        <Panel title="Book">
          {entries.length === 0 ? (
            <p className="text-soft">
              Nothing is written yet.
              {mayWrite ? ' Press Built to begin: of what, how much, how large.' : null}
            </p>
          ) : (
            <Book
              house={slug}
              heap={heap.slug}
              zone={zone}
              entries={entries}
              mayWrite={mayWrite}
              preferences={preferences}
            />
          )}
        </Panel>
      </div>
    </div>
  );
}

function CoreFigures({
  data: { curve, coreFloor, entries },
  zone,
  preferences,
}: {
  data: HeapViewData;
  zone: string;
  preferences: Preferences;
}) {
  const first = curve[0];
  if (first === undefined) return null;
  const hottest = curve.reduce((top, step) => (step.value > top.value ? step : top), first);
  const count = (kind: string) => entries.filter((entry) => entry.kind === kind).length;
  return (
    <Panel title="The heap so far">
      <Figures
        rows={[
          {
            name: 'Hottest hour of the core',
            value: `${temperature(hottest.value, preferences)}, ${longDay(hottest.at, zone)}`,
            ...(hottest.value >= HOT_CORE_C ? { note: 'too hot: see above' } : {}),
          },
          ...(coreFloor === null
            ? []
            : [{ name: 'Not drawn on under', value: temperature(coreFloor, preferences) }]),
          { name: 'Fed', value: `${count('fed')}×` },
          { name: 'Watered', value: `${count('watered')}×` },
          { name: 'Turned', value: `${count('turned')}×` },
        ]}
      />
    </Panel>
  );
}

function NoHeap({ house }: { house: { slug: string; name: string } }) {
  return (
    <>
      <h1 className="sr-only">Heap book of {house.name}</h1>
      <Empty
        title={`${house.name} has no heap yet.`}
        action={<ButtonLink href={`/${house.slug}/wiring`}>Go to Wiring</ButtonLink>}
      >
        <p>Enter the heap as a source on Wiring, with the probe in its core. Its book then opens here.</p>
      </Empty>
    </>
  );
}
