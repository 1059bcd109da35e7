import Link from 'next/link';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { energy, share, temperature, UNKNOWN } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { whyMissing } from '@/lib/wording/duty';
import { coreTrendWords } from '@/lib/wording/houses';
import type { SourceOfHouse } from './houses-data';

/** The sources of a house over their last seven whole nights. */
export function SourceWeeks({
  house,
  sources,
  preferences,
}: {
  house: string;
  sources: SourceOfHouse[];
  preferences: Preferences;
}) {
  return (
    <Table
      caption="Sources over the last seven nights"
      captionHidden
      columns={[
        { key: 'source', label: 'last 7 nights' },
        { key: 'ran', label: 'ran', figure: true },
        { key: 'heat', label: 'heat', figure: true },
        { key: 'core', label: 'core at dawn', figure: true, wideOnly: true },
      ]}
    >
      {sources.map((source) => (
        <Row key={source.slug}>
          <RowHead className="py-1.5! font-normal!">
            <Link
              href={`/${house}/duty?source=${source.slug}&nights=14${source.nights === null ? '' : `&from=${source.nights.from}&to=${source.nights.to}`}`}
              className="inline-flex min-h-6 items-center underline decoration-line underline-offset-4 hover:decoration-ink"
            >
              {source.name}
            </Link>
            <span className="block text-[0.85rem] sm:hidden">
              <Core source={source} preferences={preferences} />
            </span>
          </RowHead>
          <Cell figure className="py-1.5!">
            {source.week === null ? <Unknown why="no whole night is kept" /> : share(source.week.dutyOfNight)}
          </Cell>
          <Cell figure className="py-1.5!">
            {source.week === null ? null : source.week.heat === null ? (
              <Unknown why={source.missing === undefined ? '' : whyMissing(source.missing)} />
            ) : (
              energy(source.week.heat.kWh, 1, source.week.heat.sd)
            )}
          </Cell>
          <Cell wideOnly className="py-1.5! text-right">
            <Core source={source} preferences={preferences} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

function Unknown({ why }: { why: string }) {
  return (
    <span className="font-sans text-soft">
      {UNKNOWN}
      {why === '' ? null : <span className="block whitespace-normal text-[0.85rem]">{why}</span>}
    </span>
  );
}

function Core({ source, preferences }: { source: SourceOfHouse; preferences: Preferences }) {
  const { core } = source;
  if (core === null) return null;
  return (
    <>
      <span className="font-mono text-core">{temperature(core.last.value, preferences)}</span>
      <span
        className={core.trend?.isLastingFall === true ? 'block font-semibold text-warn' : 'block text-soft'}
      >
        {coreTrendWords(core.trend, preferences)}
      </span>
    </>
  );
}
