import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import { TabLinks } from '@/components/ui/tabs';
import type { Preferences } from '@/lib/units/preferences';
import { heapSentence } from '@/lib/wording/heap';
import { Book } from './book';
import { CoreCurve } from './core-curve';
import { FindingList } from './finding-list';
import { HeapFigures } from './heap-figures';
import { HeapActions } from './heap-actions';
import { HeatPanel } from './heat-panel';
import type { HeapOnPage, HeapViewData, HeapViewHouse } from './heap-view-data';
import { JobsPanel } from './jobs-panel';
import { MixPanel } from './mix-panel';
import { NotReady } from './not-ready';
import { ProbeRounds } from './probe-rounds';

export interface HeapViewProps {
  house: HeapViewHouse;
  data: HeapViewData;
  allowed: readonly string[];
  /** Of the outbox, and the reader's name. */
  reader: { owner: string; person: string };
  preferences: Preferences;
  now: number;
  /** YYYY-MM-DD in the house's zone. */
  today: string;
}

export function HeapView({ data, ...rest }: HeapViewProps) {
  if (data.heap === null) return <NoHeap house={rest.house} />;
  return <OneHeap data={data} heap={data.heap} {...rest} />;
}

function OneHeap({
  house,
  data,
  heap,
  allowed,
  reader,
  preferences,
  now,
  today,
}: HeapViewProps & { heap: HeapOnPage }) {
  const { slug, zone } = house;
  const mayWrite = allowed.includes('heap.write');
  const { entries, mix } = heap;
  const target = { house: slug, heap: heap.slug, zone };
  const start = {
    parts: (mix?.parts ?? []).flatMap(({ name, massKg }) =>
      massKg === null ? [] : [{ material: name, kilograms: massKg }],
    ),
    waterL: mix?.waterL ?? 0,
    own: heap.materials.map(({ id, name, density, moisture, carbon, nitrogen }) => ({
      ...{ id, name, density, moisture, carbon, nitrogen },
    })),
    mayWrite,
  };
  return (
    <div className="flex flex-col gap-5">
      <Sentence phrases={heapSentence({ ...heap, zone, now }, preferences)} before="Heap book" />
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
      {heap.notReady === null ? null : (
        <NotReady
          house={slug}
          heap={{ ...heap, notReady: heap.notReady }}
          mayGive={allowed.includes('channel.hand')}
          preferences={preferences}
        />
      )}
      <HeapActions {...{ house, data, heap, mayWrite, reader, preferences }} />
      <FindingList {...target} findings={heap.findings} mayWrite={mayWrite} preferences={preferences} />
      <div className="grid gap-5 lg:grid-cols-[minmax(0,1.35fr)_minmax(0,1fr)] lg:items-start">
        <div className="flex min-w-0 flex-col gap-5">
          <ProbeRounds
            rounds={heap.rounds}
            zone={zone}
            preferences={preferences}
            {...(mayWrite ? { amends: { house: slug, heap: heap.slug, owner: reader.owner } } : {})}
          />
          <Panel title="Core, and what was done">
            {heap.hasCorePoint ? (
              <CoreCurve
                curve={heap.curve}
                marks={entries
                  .filter((entry) => entry.kind !== 'note')
                  .map((entry) => ({ at: Date.parse(entry.at), kind: entry.kind }))
                  .reverse()}
                floor={heap.coreFloor}
                zone={zone}
                preferences={preferences}
              />
            ) : (
              <p className="text-soft">
                No probe is named as this heap’s core. Name one on Wiring, under sources.
              </p>
            )}
          </Panel>
          <HeapFigures heap={heap} zone={zone} preferences={preferences} />
          <JobsPanel
            {...{ house: slug, heap: heap.slug, today, jobs: heap.jobs, links: data.links, mayWrite }}
            latitude={house.latitude}
          />
        </div>
        <div className="flex min-w-0 flex-col gap-5">
          <MixPanel mix={mix} start={start} />
          <HeatPanel heat={heap.heat} zone={zone} preferences={preferences} />
          <Panel title="Book">
            {entries.length === 0 ? (
              <p className="text-soft">
                Nothing is written yet.
                {mayWrite ? ' Press Built to begin: of what, how much, how large.' : null}
              </p>
            ) : (
              <Book {...target} owner={reader.owner} {...{ entries, mayWrite, preferences }} />
            )}
          </Panel>
        </div>
      </div>
    </div>
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
