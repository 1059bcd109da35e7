import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { HealthFinding, HealthNight } from '@/lib/analysis/sensor-health';
import { change, decimal, difference } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { duration, nightLabel } from '@/lib/units/time';
import { healthWords } from '@/lib/wording/calibration';

const columns = [
  { key: 'night', label: 'Night' },
  { key: 'readings', label: 'Readings', figure: true },
  { key: 'noise', label: 'Noise', figure: true },
  { key: 'siblings', label: 'From its siblings', figure: true },
  { key: 'gaps', label: 'Gaps', figure: true },
  { key: 'longest', label: 'Longest', figure: true },
];
const unknown = <span className="font-sans text-soft">not known</span>;

export interface PointHealthData {
  nights: HealthNight[];
  findings: HealthFinding[];
  siblings: string[];
}

/** How the sensor has been, night by night, and what of it wants a look. */
export function PointHealthPanel({
  health: { nights, findings, siblings },
  unit,
  preferences,
}: {
  health: PointHealthData;
  unit: string;
  preferences: Preferences;
}) {
  // of a temperature in the reader's degrees, of anything else in the unit it is kept in
  const spread = (value: number) =>
    unit === 'Cel' ? difference(value, preferences, 2) : `${decimal(value, 3)} ${unit}`;
  const apart = (value: number) =>
    unit === 'Cel' ? change(value, preferences) : `${value > 0 ? '+' : ''}${decimal(value, 3)} ${unit}`;
  return (
    <Panel title="How the sensor has been">
      {nights.length === 0 ? (
        <p className="text-soft">It has sent no reading yet.</p>
      ) : (
        <>
          {findings.length === 0 ? (
            <p className="mb-2">Nothing about it wants a look.</p>
          ) : (
            <ul className="mb-3 flex flex-col gap-1 border-l-4 border-warn pl-3">
              {findings.map((one) => (
                <li key={one.what}>{healthWords(one, preferences)}</li>
              ))}
            </ul>
          )}
          <Table caption="The sensor, night by night, newest first" captionHidden columns={columns}>
            {nights.toReversed().map((one) => (
              <Row key={one.night}>
                <RowHead className="whitespace-nowrap">{nightLabel(one.night)}</RowHead>
                <Cell figure>{one.readings}</Cell>
                <Cell figure>{one.noise === null ? unknown : spread(one.noise)}</Cell>
                <Cell figure>{one.difference === null ? unknown : apart(one.difference)}</Cell>
                <Cell figure>{one.gaps.count}</Cell>
                <Cell figure>{one.gaps.count === 0 ? '' : duration(one.gaps.longestS)}</Cell>
              </Row>
            ))}
          </Table>
          <p className="mt-2 text-[0.85rem] text-soft">
            Noise is what scatters about a line through ten minutes, between one and five in the morning.{' '}
            {siblings.length === 0
              ? 'No other point here measures the same, so it is held against none.'
              : `Its siblings: ${siblings.join(', ')}.`}
          </p>
        </>
      )}
    </Panel>
  );
}
