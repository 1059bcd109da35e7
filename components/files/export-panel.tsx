'use client';
import { useState } from 'react';
import { Checkbox } from '@/components/ui/check';
import { TextField } from '@/components/ui/field';
import { fromLocal, toLocal } from '@/lib/units/local-time';
import type { FilesPoint, FilesScene } from './files-data';

const WEEK_MS = 7 * 86_400_000;

/** Tables as files: a span, the points wanted, and a link for each table. */
export function ExportPanel({
  scene,
  points,
  heaps,
  now,
}: {
  scene: FilesScene;
  points: FilesPoint[];
  heaps: { slug: string; name: string }[];
  now: number;
}) {
  const { slug, zone } = scene.house;
  const [from, setFrom] = useState(() => toLocal(now - WEEK_MS, zone));
  const [to, setTo] = useState(() => toLocal(now, zone));
  const [chosen, setChosen] = useState(() => points.slice(0, 50).map((point) => point.key));
  const [first, last] = [fromLocal(from, zone), fromLocal(to, zone)];
  const error =
    first === null || last === null
      ? 'Give both times.'
      : first >= last
        ? 'The beginning must lie before the end.'
        : undefined;
  const iso = (at: number | null) => (at === null ? '' : new Date(at).toISOString());
  const span = `from=${iso(first)}&to=${iso(last)}`;
  const at = `/api/v1/houses/${slug}`;
  return (
    <div className="flex flex-col gap-4">
      <div className="grid max-w-xl grid-cols-1 gap-3 sm:grid-cols-2">
        <TextField
          label="From"
          type="datetime-local"
          value={from}
          error={error}
          onChange={(event) => setFrom(event.target.value)}
        />
        <TextField
          label="To"
          type="datetime-local"
          value={to}
          onChange={(event) => setTo(event.target.value)}
        />
      </div>
      <details>
        <summary className="flex min-h-11 cursor-pointer items-center underline underline-offset-4">
          Points of the readings: {chosen.length} of {points.length}
        </summary>
        <fieldset className="grid grid-cols-1 gap-x-4 sm:grid-cols-2 lg:grid-cols-3">
          <legend className="sr-only">Points of the readings</legend>
          {points.map((point) => (
            <Checkbox
              key={point.key}
              label={point.name}
              checked={chosen.includes(point.key)}
              onChange={(event) =>
                setChosen((keys) =>
                  event.target.checked ? [...keys, point.key] : keys.filter((key) => key !== point.key),
                )
              }
            />
          ))}
        </fieldset>
      </details>
      <ul className="flex flex-wrap gap-x-6">
        {error !== undefined || chosen.length === 0 ? null : (
          <Fetch href={`${at}/export/readings?points=${chosen.join()}&${span}`}>Readings</Fetch>
        )}
        {error === undefined ? <Fetch href={`${at}/export/switchings?${span}`}>Switchings</Fetch> : null}
        {error === undefined ? <Fetch href={`${at}/export/runs?${span}`}>What each load did</Fetch> : null}
        <Fetch href={`${at}/nights?format=csv`}>Nights, all of them</Fetch>
        {heaps.length === 0 ? null : <Fetch href={`${at}/export/heap-book`}>Heap book, whole</Fetch>}
        {heaps.length === 0 ? null : <Fetch href={`${at}/export/probe-rounds`}>Probe rounds</Fetch>}
      </ul>
      <p className="max-w-prose text-[0.9rem] text-soft">
        Times carry their offset, heads their unit. Readings are corrected by their calibration; those that
        are doubtful or bad say so in the column beside them. What each load did, with the readings of its
        loop, is what nights are reckoned from.
      </p>
    </div>
  );
}

function Fetch({ href, children }: { href: string; children: string }) {
  return (
    <li>
      <a
        href={href}
        download
        className="inline-flex min-h-11 items-center font-semibold underline underline-offset-4"
      >
        {children}
      </a>
    </li>
  );
}
