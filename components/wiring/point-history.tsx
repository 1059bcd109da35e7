import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { Calibration } from '@/lib/schema/calibration';
import { difference, temperature } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { moment } from '@/lib/units/time';
import { correctionWords, KIND_WORDS, REFERENCE_WORDS } from '@/lib/wording/calibration';

const columns = [
  { key: 'from', label: 'In force from' },
  { key: 'correction', label: 'Correction', figure: true },
  { key: 'how', label: 'Found by' },
  { key: 'left', label: 'Left', figure: true },
  { key: 'by', label: 'By whom' },
];

/** Every calibration that the point ever had: a reading is corrected by the one of its time. */
export function PointHistory({
  calibrations,
  zone,
  now,
  preferences,
}: {
  /** Newest first. */
  calibrations: Calibration[];
  zone: string;
  now: number;
  preferences: Preferences;
}) {
  return (
    <Table caption="Calibrations, newest first" captionHidden columns={columns}>
      {calibrations.map((one) => (
        <Row key={one.id}>
          <RowHead className="whitespace-nowrap">
            {Date.parse(one.from) === 0
              ? 'the beginning'
              : moment(Date.parse(one.from), now, zone, preferences)}
          </RowHead>
          <Cell figure>{correctionWords(one)}</Cell>
          <Cell className="min-w-52">
            {KIND_WORDS[one.kind]}
            {one.places === null ? null : (
              <span className="block text-[0.9rem] text-soft">
                {one.places
                  .map(
                    ({ at, raw, reference }) =>
                      `${REFERENCE_WORDS[at]} ${temperature(reference, preferences, 2)}, read ${temperature(raw, preferences, 2)}`,
                  )
                  .join('; ')}
              </span>
            )}
            {one.note === '' ? null : <span className="block text-[0.9rem] wrap-anywhere">“{one.note}”</span>}
          </Cell>
          <Cell figure>
            {one.residual === null ? (
              <span className="font-sans text-soft">not told</span>
            ) : (
              `± ${difference(one.residual, preferences, 2)}`
            )}
          </Cell>
          <Cell>{one.by}</Cell>
        </Row>
      ))}
    </Table>
  );
}
