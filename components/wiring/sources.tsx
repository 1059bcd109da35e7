import { Panel } from '@/components/ui/panel';
import { Phrases } from '@/components/ui/sentence';
import { Empty } from '@/components/ui/states';
import type { Channel, Loop, Point, Source } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { exactly, level } from '@/lib/wording/settings';
import { LOOP_CAUTION, loopSentence } from '@/lib/wording/wiring-parts';
import { AddButton, ChangeButton } from './editing';
import { partLine } from './part-line';

const kinds = { heap: 'compost heap', ground: 'ground tubes', heater: 'heater', other: 'source' };

function sourceWords(source: Source, points: Point[], preferences: Preferences): string {
  const name = (key: string | null) => points.find((point) => point.key === key)?.name ?? null;
  const core = name(source.corePoint);
  const base = name(source.basePoint);
  return [
    core === null ? 'its core is not measured' : `core at ${core}`,
    base === null ? '' : `beside the pipe at ${base}`,
    source.coreFloor === null ? '' : `no draw under ${level(source.coreFloor, preferences)}`,
    source.dailyLimit === null ? '' : `${exactly(source.dailyLimit)} of draw in 24 h at most`,
    source.ready === null
      ? ''
      : `new: ready once above ${level(source.ready.level, preferences)} for ${exactly(source.ready.for)}`,
  ]
    .filter(Boolean)
    .join('; ');
}

/** What heat is drawn from, and the pipes through it. */
export function Sources({
  sources,
  loops,
  points,
  channels,
  preferences,
}: {
  sources: Source[];
  loops: Loop[];
  points: Point[];
  channels: Channel[];
  preferences: Preferences;
}) {
  const pointName = (key: string) => points.find((point) => point.key === key)?.name ?? key;
  return (
    <Panel title="Sources and loops" actions={<AddButton kind="source" label="Add a source…" />}>
      {sources.length === 0 ? (
        <Empty title="No source yet.">
          A heap, ground tubes, a heater: what heat is drawn from, and what must rest.
        </Empty>
      ) : (
        <ul className="divide-y divide-line border-t border-line">
          {sources.map((source) => (
            <li key={source.id} className={partLine}>
              <div className="min-w-0 flex-1">
                <strong>{source.name}</strong>, {kinds[source.kind]}
                <span className="block text-[0.9rem] text-soft">
                  {sourceWords(source, points, preferences)}
                </span>
              </div>
              <ChangeButton kind="source" id={source.id} of={source.name} />
            </li>
          ))}
        </ul>
      )}
      <div className="mt-4 flex flex-wrap items-center justify-between gap-2">
        <h3 className="font-semibold">Loops</h3>
        {sources.length === 0 || channels.length === 0 ? null : <AddButton kind="loop" label="Add a loop…" />}
      </div>
      {loops.length === 0 ? (
        <p className="text-soft">
          No loop yet: how much heat a fan moves is told from its loop’s two points.
        </p>
      ) : (
        <ul className="divide-y divide-line">
          {loops.map((loop) => (
            <li key={loop.id} className={partLine}>
              <p className="min-w-0 flex-1">
                <strong>{loop.name}.</strong>{' '}
                <Phrases
                  phrases={loopSentence({
                    channel: channels.find((one) => one.key === loop.channel)?.label ?? loop.channel,
                    source: sources.find((one) => one.slug === loop.source)?.name ?? loop.source,
                    intake: pointName(loop.intake),
                    return: pointName(loop.return),
                  })}
                />
              </p>
              <ChangeButton kind="loop" id={loop.id} of={loop.name} />
            </li>
          ))}
        </ul>
      )}
      {sources.some((source) => source.kind === 'heap') ? (
        <p className="mt-3 border-l-4 border-warn pl-3 text-[0.9rem] text-soft">{LOOP_CAUTION}</p>
      ) : null}
    </Panel>
  );
}
