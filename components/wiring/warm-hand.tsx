'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { useAppNow } from '@/components/ui/clock';
import { Select } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { useAwake } from '@/components/ui/use-awake';
import { warmHand, type Watched } from '@/lib/analysis/warm-hand';
import { change } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { handWords } from '@/lib/wording/warm-hand';
import { ExchangeButton } from './exchange-button';
import { usePolled } from './use-polled';

interface Series {
  points: Record<string, { at: string[]; value: number[] }>;
}

const EVERY_MS = 2000;
/** The interface tells of twenty points at a time. */
const AT_A_TIME = 20;
const BEFORE_MS = 180_000;

/** Somebody holds one probe, and all points of its node are watched: the one that warms is the one in the hand. */
export function WarmHand({
  house,
  points,
  preferences,
}: {
  house: string;
  /** Measured temperatures of one node. */
  points: { key: string; name: string }[];
  preferences: Preferences;
}) {
  const isAwake = useAwake();
  const now = useAppNow();
  const [held, setHeld] = useState(points[0]?.key ?? '');
  const [since, setSince] = useState<number | null>(null);
  const keys = points.map((one) => one.key);
  const from = since === null ? '' : new Date(since - BEFORE_MS).toISOString();
  const paths =
    since === null
      ? []
      : Array.from({ length: Math.ceil(keys.length / AT_A_TIME) }, (_, place) => {
          const some = keys.slice(place * AT_A_TIME, (place + 1) * AT_A_TIME).join(',');
          return `/houses/${house}/readings?points=${some}&from=${from}&step=raw`;
        });
  const { answers, isLost } = usePolled<Series>(paths, EVERY_MS);
  const watched = (answers ?? []).flatMap(({ points: series }) =>
    Object.entries(series).map(([key, { at, value }]): Watched => ({
      key,
      readings: at.map((time, place) => ({ at: Date.parse(time), value: value[place] ?? 0 })),
    })),
  );
  const nameOf = (key: string) => points.find((one) => one.key === key)?.name ?? key;
  const found = since === null ? null : warmHand(watched, since);
  const words =
    found === null || since === null
      ? null
      : handWords(found, held, nameOf, (now - since) / 1000, preferences);

  return (
    <div className="flex flex-col gap-4">
      <fieldset disabled={!isAwake} className="flex flex-col gap-3">
        <Select
          label="I take into my hand the probe of"
          value={held}
          onChange={(event) => {
            setHeld(event.target.value);
            setSince(null);
          }}
        >
          {points.map((one) => (
            <option key={one.key} value={one.key}>
              {one.name} ({one.key})
            </option>
          ))}
        </Select>
        <Button kind="primary" className="self-start" onClick={() => setSince(now)}>
          {since === null ? 'I hold it now' : 'Begin anew'}
        </Button>
      </fieldset>
      <div role="status">
        {words === null ? null : (
          <Notice
            tone={words.tone === 'warn' ? 'warn' : 'quiet'}
            title={words.tone === 'good' ? 'The right probe' : 'Watching'}
            actions={
              words.exchangeWith === null ? undefined : (
                <ExchangeButton
                  house={house}
                  one={{ key: held, name: nameOf(held) }}
                  other={{ key: words.exchangeWith, name: nameOf(words.exchangeWith) }}
                  onDone={() => setSince(null)}
                />
              )
            }
          >
            {isLost ? 'The server does not answer; trying again. ' : ''}
            {words.text}
          </Notice>
        )}
      </div>
      {found === null ? null : (
        <ul className="divide-y divide-line border-t border-line">
          {found.rises.map(({ key, rise }) => (
            <li key={key} data-warmed={key === found.warmed} className="flex justify-between gap-4 py-2">
              <span className={key === found.warmed ? 'font-semibold text-ember' : ''}>{nameOf(key)}</span>
              <span className="font-mono">
                {rise === null ? 'no reading since' : change(rise, preferences)}
              </span>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
