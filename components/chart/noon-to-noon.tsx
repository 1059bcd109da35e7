import { useId } from 'react';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { degrees, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { clock } from '@/lib/units/time';
import { hourRows, nightSummary } from '@/lib/wording/night-summary';
import { NARROW, WIDE, type NightChart } from './night-chart';
import { nightLayout } from './night-layout';
import { NightSvg } from './night-svg';

/**
 * A night from noon to noon, drawn on the server: two drawings, of which the space at hand shows one, so that text keeps
 * its size on a phone. Beside them, for whoever does not see them, a summary and the hours as a table.
 */
export function NoonToNoon({ chart, preferences }: { chart: NightChart; preferences: Preferences }) {
  const id = useId().replaceAll(/[^a-z0-9]/gi, '');
  return (
    <figure className="@container">
      <NightSvg
        id={`${id}w`}
        layout={nightLayout(chart, WIDE, preferences)}
        className="hidden @[35rem]:block"
      />
      <NightSvg id={`${id}n`} layout={nightLayout(chart, NARROW, preferences)} className="@[35rem]:hidden" />
      <figcaption className="sr-only">{nightSummary(chart, preferences)}</figcaption>
      <details className="mt-1">
        <summary className="flex min-h-11 w-fit cursor-pointer items-center text-[0.9rem] text-soft underline underline-offset-4 hover:text-ink">
          The night in figures
        </summary>
        <HourTable chart={chart} preferences={preferences} />
      </details>
    </figure>
  );
}

function HourTable({ chart, preferences }: { chart: NightChart; preferences: Preferences }) {
  return (
    <Table
      caption="Hour by hour"
      captionHidden
      columns={[
        { key: 'hour', label: 'Hour' },
        ...chart.lines.map((line) => ({
          key: line.key,
          label: `${line.name}, ${degrees(preferences)}`,
          figure: true,
        })),
        ...chart.strips.map((strip) => ({
          key: `ran-${strip.key}`,
          label: `${strip.label}, min`,
          figure: true,
        })),
      ]}
    >
      {hourRows(chart).map((row) => (
        <Row key={row.at}>
          <RowHead>{clock(row.at, chart.zone, preferences)}</RowHead>
          {row.values.map((value, place) => (
            <Cell key={place} figure>
              {value === null ? 'none' : temperatureFigure(value, preferences)}
            </Cell>
          ))}
          {row.ranS.map((seconds, place) => (
            <Cell key={place} figure>
              {Math.round(seconds / 60)}
            </Cell>
          ))}
        </Row>
      ))}
    </Table>
  );
}
