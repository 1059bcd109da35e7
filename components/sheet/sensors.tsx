import { roleWords } from '@/components/wiring/forms/options';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Point } from '@/lib/schema/yard-view';
import { difference } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { day } from '@/lib/units/time';
import { correctionWords } from '@/lib/wording/calibration';
import type { SheetData } from './sheet-data';

const columns = [
  { key: 'point', label: 'Sensor' },
  { key: 'measures', label: 'Measures' },
  { key: 'node', label: 'Wired to' },
  { key: 'calibration', label: 'Calibration', figure: true },
  { key: 'when', label: 'When, by whom' },
];

/** Sensors with the calibration that is in force. Derived points have no wire, so they are not on the sheet. */
export function Sensors({
  data,
  zone,
  now,
  preferences,
}: {
  data: SheetData;
  zone: string;
  /** Epoch ms. */
  now: number;
  preferences: Preferences;
}) {
  const wired = data.points.filter((one) => one.node !== null);
  const whenWords = (point: Point): string => {
    const last = data.calibrations[point.id];
    // what stands for "as it is" was typed when the point was added, and is no calibration
    if (last === undefined || (last.residual === null && correctionWords(point) === 'none'))
      return 'not calibrated';
    if (last.from === 0) return 'typed when it was added';
    const year = new Date(last.from).getUTCFullYear();
    const far = year === new Date(now).getUTCFullYear() ? '' : ` ${year}`;
    const left = last.residual === null ? '' : `, ± ${difference(last.residual, preferences, 2)} left`;
    return `${day(last.from, zone)}${far}, ${last.by}${left}`;
  };
  return (
    <section>
      <h2 className="font-semibold">Sensors</h2>
      {wired.length === 0 ? (
        <p>None.</p>
      ) : (
        <Table caption="Sensors" captionHidden columns={columns}>
          {wired.map((point) => (
            <Row key={point.id} className="print:break-inside-avoid">
              <RowHead>
                {point.name} <span className="font-mono font-normal text-soft">{point.key}</span>
              </RowHead>
              <Cell>
                {roleWords(point.role)}
                {point.sensor === null ? '' : `, ${point.sensor}`}
              </Cell>
              <Cell className="font-mono">{point.node}</Cell>
              <Cell figure>{correctionWords(point)}</Cell>
              <Cell>{whenWords(point)}</Cell>
            </Row>
          ))}
        </Table>
      )}
    </section>
  );
}
