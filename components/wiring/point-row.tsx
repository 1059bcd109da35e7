import Link from 'next/link';
import { Age } from '@/components/ui/age';
import { CardCell, CardRow, CardRowHead, type CardColumn } from '@/components/ui/card-table';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import { pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { correctionWords } from '@/lib/wording/calibration';
import { exactly } from '@/lib/wording/settings';
import { ChangeButton } from './editing';
import { roleWords } from './forms/options';
import { PointDoubt } from './point-doubt';

const TERM = {
  point: 'Point',
  now: 'Now',
  heard: 'Heard',
  wired: 'Wired to',
  range: 'Range',
  stale: 'Silent after',
  calibration: 'Calibration',
};
export const POINT_COLUMNS: readonly CardColumn[] = [
  { key: 'point', label: TERM.point },
  { key: 'now', label: TERM.now, figure: true },
  { key: 'heard', label: TERM.heard },
  { key: 'wired', label: TERM.wired },
  { key: 'range', label: TERM.range, figure: true },
  { key: 'stale', label: TERM.stale, figure: true },
  { key: 'calibration', label: TERM.calibration, figure: true },
  { key: 'act', label: 'Change', labelHidden: true },
];

/** One point: what it says now, how it is wired, and between which values it is believed. */
export function PointRow({
  house,
  point,
  now,
  reportEvery,
  appNow,
  zone,
  preferences,
}: {
  /** Its slug. */
  house: string;
  point: Point;
  now: StatePoint | undefined;
  reportEvery: number | undefined;
  /** Epoch ms. */
  appNow: number;
  zone: string;
  preferences: Preferences;
}) {
  const range = (value: number | null) => (value === null ? '' : pointValue(value, point.unit, preferences));
  const stale = point.staleAfter ?? (reportEvery === undefined ? null : reportEvery * 3);
  return (
    <CardRow>
      <CardRowHead className="min-w-40">
        <Link
          href={`/${house}/wiring/points/${point.key}`}
          className="-my-2.5 flex min-h-11 items-center underline underline-offset-4"
        >
          {point.name}
        </Link>
        <span className="block text-[0.85rem] font-normal text-soft">
          <span className="font-mono">{point.key}</span>, {roleWords(point.role)}
        </span>
      </CardRowHead>
      <CardCell term={TERM.now} figure>
        {now === undefined || now.value === null ? (
          <span className="font-sans text-soft">not known yet</span>
        ) : (
          pointValue(now.value, point.unit, preferences)
        )}
        {now === undefined ? null : (
          <PointDoubt point={now} staleS={stale} now={appNow} {...{ zone, preferences }} />
        )}
      </CardCell>
      <CardCell term={TERM.heard} className="whitespace-nowrap">
        {now?.at === null || now === undefined ? (
          <span className="text-soft">never</span>
        ) : (
          <Age at={Date.parse(now.at)} />
        )}
      </CardCell>
      <CardCell term={TERM.wired}>
        {point.node === null ? (
          <span className="text-soft">made of {point.derived?.points.join(', ')}</span>
        ) : (
          <span className="font-mono">{point.node}</span>
        )}
      </CardCell>
      <CardCell term={TERM.range} figure>
        {point.min === null && point.max === null ? (
          <span className="font-sans text-soft">any</span>
        ) : (
          `${range(point.min) || 'any'} to ${range(point.max) || 'any'}`
        )}
      </CardCell>
      <CardCell term={TERM.stale} figure>
        {stale === null ? <span className="font-sans text-soft">as its inputs</span> : exactly(stale)}
      </CardCell>
      <CardCell term={TERM.calibration} figure>
        {correctionWords(point)}
      </CardCell>
      <CardCell className="py-0 align-middle sm:text-right max-sm:-ml-4">
        <ChangeButton kind="point" id={point.id} of={point.name} />
      </CardCell>
    </CardRow>
  );
}
