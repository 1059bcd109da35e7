import { Age } from '@/components/ui/age';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import { decimal, pointValue } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { backWords, qualityWords, UNSTEADY_WORDS } from '@/lib/wording/quality';
import { exactly } from '@/lib/wording/settings';
import { AddButton, ChangeButton } from './editing';
import { roleWords } from './forms/options';

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

/** That a point was away is news for a day. */
const TOLD_MS = 86_400_000;
/** A report that came late is none. */
const SHORT_MS = 60_000;

const instant = (iso: string | null | undefined) => (typeof iso === 'string' ? Date.parse(iso) : null);

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
  const scene = { now: appNow, zone, preferences };
  const range = (value: number | null) => (value === null ? '' : pointValue(value, point.unit, preferences));
  const stale = point.staleAfter ?? (reportEvery === undefined ? null : reportEvery * 3);
  const isOld =
    stale !== null && now !== undefined && now.at !== null && appNow - Date.parse(now.at) > stale * 1000;
  // the worker says so itself; where it stands still, its last word has grown old too
  const doubt = isOld
    ? qualityWords({ quality: 'bad', why: 'silent' }, scene)
    : now === undefined
      ? null
      : qualityWords({ ...now, since: instant(now.doubtSince) }, scene);
  const last = now?.lastDoubt ?? null;
  const isBack =
    doubt === null &&
    last !== null &&
    appNow - Date.parse(last.to) < TOLD_MS &&
    Date.parse(last.to) - Date.parse(last.from) >= SHORT_MS;
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
        {doubt === null ? null : (
          <span className="ml-auto block max-w-44 font-sans text-[0.85rem] whitespace-normal text-warn">
            {doubt}
          </span>
        )}
        {isBack ? (
          <span className="ml-auto block max-w-44 font-sans text-[0.85rem] whitespace-normal text-soft">
            {backWords({ why: last.why, from: Date.parse(last.from), to: Date.parse(last.to) }, scene)}
          </span>
        ) : null}
        {now?.why === 'unsteady' ? (
          <span className="ml-auto block max-w-56 font-sans text-[0.85rem] whitespace-normal text-soft">
            {UNSTEADY_WORDS}
          </span>
        ) : null}
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
