import { ButtonLink } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Sentence } from '@/components/ui/sentence';
import { referenceOf } from '@/lib/analysis/reference-place';
import type { Calibration } from '@/lib/schema/calibration';
import type { StatePoint } from '@/lib/schema/house-state';
import type { PointPhotograph } from '@/lib/schema/point-photograph';
import type { House, Point } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import { pointSentence } from '@/lib/wording/point';
import { PointCalibrate } from './point-calibrate';
import { PointHealthPanel, type PointHealthData } from './point-health';
import { PointHistory } from './point-history';
import { PointPhotographs } from './point-photographs';

export interface PointPageData {
  house: House;
  point: Point;
  calibrations: Calibration[];
  health: PointHealthData;
  photographs: PointPhotograph[];
  state: StatePoint | null;
}

/** One point: what it says, how it was calibrated, how its sensor has been, and where it hangs. */
export function PointView({
  data: { house, point, calibrations, health, photographs, state },
  allowed,
  preferences,
  now,
}: {
  data: PointPageData;
  allowed: readonly string[];
  preferences: Preferences;
  now: number;
}) {
  const mayWrite = allowed.includes('wiring.write');
  const isBathed = point.unit === 'Cel' && point.derived === null;
  const { zone } = house;
  return (
    <div className="flex flex-col gap-5">
      <Sentence
        before={point.name}
        phrases={pointSentence({ point, state, newest: calibrations[0] ?? null }, { now, zone, preferences })}
      />
      <div className="flex flex-wrap gap-2">
        <ButtonLink href={`/${house.slug}/wiring`}>All of its wiring</ButtonLink>
        {point.node === null || !isBathed ? null : (
          <ButtonLink href={`/${house.slug}/wiring/warm-hand?node=${point.node}`}>
            The warm-hand test: is it the right probe?
          </ButtonLink>
        )}
      </div>
      {isBathed && mayWrite ? (
        <Panel title="Calibrate it">
          <PointCalibrate
            house={house.slug}
            point={point.key}
            gain={point.gain}
            known={{
              ice: referenceOf('ice', house.altitude),
              boiling: referenceOf('boiling', house.altitude),
            }}
            preferences={preferences}
          />
        </Panel>
      ) : null}
      {point.derived === null ? (
        <Panel title="Calibrations">
          <PointHistory {...{ calibrations, zone, now, preferences }} />
        </Panel>
      ) : null}
      <PointHealthPanel health={health} unit={point.unit} preferences={preferences} />
      <Panel title="Its place">
        <PointPhotographs
          house={house.slug}
          point={point.key}
          name={point.name}
          {...{ photographs, mayWrite }}
        />
      </Panel>
    </div>
  );
}
