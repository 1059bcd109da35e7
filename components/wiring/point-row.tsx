import Link from 'next/link';
import { Age } from '@/components/ui/age';
import { Cell, Row, RowHead } from '@/components/ui/table';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import { pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { correctionWords } from '@/lib/wording/calibration';
import { exactly } from '@/lib/wording/settings';
import { ChangeButton } from './editing';
import { roleWords } from './forms/options';
import { PointDoubt } from './point-doubt';

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
    <Row>
      <RowHead className="min-w-40">
        <Link
          href={`/${house}/wiring/points/${point.key}`}
          className="-my-2.5 flex min-h-11 items-center underline underline-offset-4"
        >
          {point.name}
        </Link>
        <span className="block text-[0.85rem] font-normal text-soft">
          <span className="font-mono">{point.key}</span>, {roleWords(point.role)}
        </span>
      </RowHead>
      <Cell figure>
        {now === undefined || now.value === null ? (
          <span className="font-sans text-soft">not known yet</span>
        ) : (
          pointValue(now.value, point.unit, preferences)
        )}
        {now === undefined ? null : (
          <PointDoubt point={now} staleS={stale} now={appNow} {...{ zone, preferences }} />
        )}
      </Cell>
      <Cell className="whitespace-nowrap">
        {now?.at === null || now === undefined ? (
          <span className="text-soft">never</span>
        ) : (
          <Age at={Date.parse(now.at)} />
        )}
      </Cell>
      <Cell>
        {point.node === null ? (
          <span className="text-soft">made of {point.derived?.points.join(', ')}</span>
        ) : (
          <span className="font-mono">{point.node}</span>
        )}
      </Cell>
      <Cell figure wideOnly>
        {point.min === null && point.max === null ? (
          <span className="font-sans text-soft">any</span>
        ) : (
          `${range(point.min) || 'any'} to ${range(point.max) || 'any'}`
        )}
      </Cell>
      <Cell figure wideOnly>
        {stale === null ? <span className="font-sans text-soft">as its inputs</span> : exactly(stale)}
      </Cell>
      <Cell figure>{correctionWords(point)}</Cell>
      <Cell className="py-0 text-right align-middle">
        <ChangeButton kind="point" id={point.id} of={point.name} />
      </Cell>
    </Row>
  );
}
