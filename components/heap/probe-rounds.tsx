import { Panel } from '@/components/ui/panel';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { probeSummary } from '@/lib/analysis/probe-section';
import type { ProbeSet } from '@/lib/schema/probe-set';
import { degrees, difference, temperature, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { longDay } from '@/lib/wording/heap';
import { RoundButton } from './round-button';
import type { RoundsToAmend } from './round-target';
import { SectionDrawing } from './section-drawing';

/** The last round drawn, what has changed since the one before, and the rounds as a table. */
export function ProbeRounds({
  rounds,
  zone,
  preferences,
  amends,
}: {
  rounds: ProbeSet[];
  zone: string;
  preferences: Preferences;
  /** Left out for who only reads. */
  amends?: RoundsToAmend;
}) {
  const [last, before] = rounds;
  if (last === undefined)
    return (
      <Panel title="Probe rounds">
        <p className="text-soft">
          None yet. A round reads the heap at the same places each time, and draws it in section: where it is
          hot, where it is cold, and whether the cold side is dry.
        </p>
      </Panel>
    );
  const at = Date.parse(last.at);
  return (
    <Panel title={`Probe round of ${longDay(at, zone)}, ${clock(at, zone, preferences)}`}>
      <p className="mb-2 text-[0.9rem] text-soft">{noteOf(last, before, preferences)}</p>
      <div className="overflow-x-auto" tabIndex={0} role="group" aria-label="The heap in section">
        <SectionDrawing id={last.id} section={last.section} places={last.places} preferences={preferences} />
      </div>
      {last.text === '' ? null : <p className="mt-2 max-w-prose whitespace-pre-line">{last.text}</p>}
      <details className="mt-2">
        <summary className="flex min-h-11 cursor-pointer items-center text-[0.9rem] text-soft underline underline-offset-4">
          Rounds as a table
        </summary>
        <Table
          caption="Probe rounds"
          captionHidden
          columns={[
            { key: 'day', label: 'Round' },
            { key: 'many', label: 'places', figure: true },
            { key: 'cold', label: `coldest ${degrees(preferences)}`, figure: true },
            { key: 'mean', label: `mean ${degrees(preferences)}`, figure: true },
            { key: 'hot', label: `hottest ${degrees(preferences)}`, figure: true },
            ...(amends === undefined ? [] : [{ key: 'act', label: 'Change', labelHidden: true }]),
          ]}
        >
          {rounds.map((round) => (
            <RoundRow key={round.id} {...{ round, zone, preferences, amends }} />
          ))}
        </Table>
      </details>
    </Panel>
  );
}

function RoundRow({
  round,
  zone,
  preferences,
  amends,
}: {
  round: ProbeSet;
  zone: string;
  preferences: Preferences;
  amends: RoundsToAmend | undefined;
}) {
  const sum = probeSummary(round.places);
  if (sum === null) return null;
  const at = Date.parse(round.at);
  const figure = (celsius: number) => temperatureFigure(celsius, preferences);
  return (
    <Row>
      <RowHead>
        {longDay(at, zone)}, {clock(at, zone, preferences)}
        {round.amendedBy === null ? null : (
          <span className="block text-[0.85rem] font-normal text-soft">amended by {round.amendedBy}</span>
        )}
      </RowHead>
      <Cell figure>{sum.many}</Cell>
      <Cell figure>{figure(sum.coldest.celsius)}</Cell>
      <Cell figure>{figure(sum.meanC)}</Cell>
      <Cell figure>{figure(sum.hottest.celsius)}</Cell>
      {amends === undefined ? null : (
        <Cell>
          <RoundButton {...amends} {...{ zone, preferences, round }} section={null} />
        </Cell>
      )}
    </Row>
  );
}

/** Rounds compare only where the same places were read: else the mean moves with the places. */
function noteOf(last: ProbeSet, before: ProbeSet | undefined, preferences: Preferences): string {
  const sum = probeSummary(last.places);
  if (sum === null) return '';
  const many = `${sum.many} ${sum.many === 1 ? 'place' : 'places'} in section, ${last.section.left} at the left, from ${temperature(sum.coldest.celsius, preferences)} to ${temperature(sum.hottest.celsius, preferences)}.`;
  const rest = 'Warmth is drawn between the probes; where no probe was near, nothing is drawn.';
  const same = sharedPlaces(last, before);
  if (same.length === 0) return `${many} ${rest}`;
  const mean = same.reduce((total, change) => total + change, 0) / same.length;
  const word = mean < 0 ? 'colder' : 'warmer';
  const changed =
    Math.abs(mean) < 0.5
      ? 'As the round before, place by place.'
      : `Place by place ${difference(Math.abs(mean), preferences)} ${word} than the round before.`;
  return `${many} ${changed} ${rest}`;
}

function sharedPlaces(last: ProbeSet, before: ProbeSet | undefined): number[] {
  if (before === undefined) return [];
  const isSame = last.section.columns === before.section.columns && last.section.rows === before.section.rows;
  if (!isSame) return [];
  return last.places.flatMap((place) => {
    const then = before.places.find((one) => one.column === place.column && one.row === place.row);
    return then === undefined ? [] : [place.celsius - then.celsius];
  });
}
