import { ButtonLink } from '@/components/ui/button';
import { CardTable } from '@/components/ui/card-table';
import { Panel } from '@/components/ui/panel';
import { Empty } from '@/components/ui/states';
import type { StatePoint } from '@/lib/schema/house-state';
import type { Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { AddButton } from './editing';
import { POINT_COLUMNS, PointRow } from './point-row';

/** Where something is measured, with what it says now and how old that is. */
export function Points({
  house,
  points,
  states,
  nodes,
  now,
  zone,
  preferences,
}: {
  /** Its slug. */
  house: string;
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
      actions={
        nodes.length === 0 ? undefined : (
          <>
            <ButtonLink href={`/${house}/wiring/warm-hand`}>Warm-hand test</ButtonLink>
            <AddButton kind="point" label="Add a point…" />
          </>
        )
      }
    >
      {points.length === 0 ? (
        <Empty title="No point yet.">
          A point is a place where something is measured. The house air first: without a reading of the house
          nothing can be judged, not even frost.
        </Empty>
      ) : (
        <CardTable caption="Points" columns={POINT_COLUMNS}>
          {points.map((point) => (
            <PointRow
              key={point.id}
              house={house}
              point={point}
              now={states.find((one) => one.key === point.key)}
              reportEvery={nodes.find((one) => one.key === point.node)?.reportEvery}
              appNow={now}
              zone={zone}
              preferences={preferences}
            />
          ))}
        </CardTable>
      )}
    </Panel>
  );
}
