import { Age } from '@/components/ui/age';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import { decimal, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { exactly } from '@/lib/wording/settings';
import { AddButton, ChangeButton } from './editing';
import { roleWords } from './forms/options';
import { PointDoubt } from './point-doubt';

const columns = [
  { key: 'point', label: 'Point' },
  { key: 'now', label: 'Now', figure: true },
  { key: 'heard', label: 'Heard' },
  { key: 'wired', label: 'Wired to' },
  { key: 'range', label: 'Range', figure: true, wideOnly: true },
  { key: 'stale', label: 'Silent after', figure: true, wideOnly: true },
  { key: 'calibration', label: 'Calibration', figure: true },
  { key: 'act', label: 'Change', labelHidden: true },
];

function calibrationWords(point: Point): string {
  const gain = point.gain === 1 ? '' : `× ${decimal(point.gain, 3)} `;
  const offset = point.offset === 0 ? '' : `${point.offset > 0 ? '+' : ''}${decimal(point.offset, 2)}`;
  return `${gain}${offset}`.trim() || 'none';
}

function PointRow({
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

/** Where something is measured, with what it says now and how old that is. */
export function Points({
  points,
  states,
  nodes,
  now,
  zone,
  preferences,
}: {
  points: Point[];
  states: StatePoint[];
  nodes: { key: string; reportEvery: number }[];
  /** Epoch ms of app time. */
  now: number;
  zone: string;
  preferences: Preferences;
}) {
  return (
    <Panel
      title="Points"
      actions={nodes.length === 0 ? undefined : <AddButton kind="point" label="Add a point…" />}
    >
      {points.length === 0 ? (
        <Empty title="No point yet.">
          A point is a place where something is measured. The house air first: without a reading of the house
          nothing can be judged, not even frost.
        </Empty>
      ) : (
        <Table caption="Points" captionHidden columns={columns}>
          {points.map((point) => (
            <PointRow
              key={point.id}
              point={point}
              now={states.find((one) => one.key === point.key)}
              reportEvery={nodes.find((one) => one.key === point.node)?.reportEvery}
              appNow={now}
              zone={zone}
              preferences={preferences}
            />
          ))}
        </Table>
      )}
    </Panel>
  );
}
