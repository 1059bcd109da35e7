'use client';
import { useId } from 'react';
import { Panel } from '@/components/ui/panel';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { useHouse } from './live-house';
import { yardFacts, type YardFacts } from './yard-facts';
import { figure, Ground, Heap, House, note, type Short } from './yard-parts';
import { yardWords } from './yard-words';

/** House, heap in its pit, loop and ground tubes in section, with what is known of each where it is. */
export function YardDrawing() {
  const house = useHouse();
  if (house.state === null) return null;
  // air is drawn moving only where a relay says so now
  const known = house.isStale
    ? {
        ...house.state,
        channels: house.state.channels.map((one) => ({ ...one, reported: null, state: 'off' as const })),
      }
    : house.state;
  const facts = yardFacts(house, known);
  return (
    <Panel title="Where the heat is going">
      <Section facts={facts} preferences={house.preferences} />
    </Panel>
  );
}

export function Section({ facts, preferences }: { facts: YardFacts; preferences: Preferences }) {
  const id = useId();
  const short: Short = (value) => (value === null ? '?' : `${temperatureFigure(value, preferences)}°`);
  const { heap, ground } = facts;
  return (
    <svg role="img" aria-labelledby={id} viewBox="0 0 352 264" className="h-auto w-full">
      <title id={id}>{yardWords(facts, preferences)}</title>
      <rect x="0" y="136" width="352" height="128" rx="4" className="fill-earth" />
      <House facts={facts} short={short} />
      {ground === null ? null : <Ground ground={ground} short={short} preferences={preferences} />}
      {heap === null ? null : <Heap heap={heap} short={short} />}
      <text x="156" y="46" className={`fill-outdoors text-[19px] ${figure}`}>
        {short(facts.outdoors)}
      </text>
      <text x="156" y="62" className={note}>
        outdoors
      </text>
    </svg>
  );
}
