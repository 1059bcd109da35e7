import { Age } from '@/components/ui/age';
import { Cell, Row, RowHead } from '@/components/ui/table';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import { decimal, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import { ChangeButton } from './editing';
import { roleWords } from './forms/options';
import { PointDoubt } from './point-doubt';

function calibrationWords(point: Point): string {
  const gain = point.gain === 1 ? '' : `× ${decimal(point.gain, 3)} `;
  const offset = point.offset === 0 ? '' : `${point.offset > 0 ? '+' : ''}${decimal(point.offset, 2)}`;
  return `${gain}${offset}`.trim() || 'none';
}

/** One point: what it says now, how it is wired, and between which values it is believed. */
export function PointRow({
  point,
  now,
  reportEvery,
  appNow,
  zone,
  preferences,
}: {
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
        {point.name}
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
      <Cell figure>{calibrationWords(point)}</Cell>
      <Cell className="py-0 text-right align-middle">
        <ChangeButton kind="point" id={point.id} of={point.name} />
      </Cell>
    </Row>
  );
}
