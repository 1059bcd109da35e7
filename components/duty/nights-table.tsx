import Link from 'next/link';
import { classes } from '@/components/ui/classes';
import { Table, type Column } from '@/components/ui/table';
import type { NightSummary } from '@/lib/analysis/nights';
import type { NightTotals } from '@/lib/analysis/totals';
import { decimal, degrees, share, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { nightDate } from '@/lib/wording/duty';
import { addressOf, type DutyAddress, type Sort } from './address';
import { NightStrip, QUARTERS, StripAxis } from './night-strip';

export interface NightsTableProps {
  house: string;
  address: DutyAddress;
  nights: NightSummary[];
  totals: NightTotals;
  frostLimitC: number | null;
  preferences: Preferences;
}

const sortValue: Record<Sort, (night: NightSummary) => number | string | null> = {
  night: (night) => night.night,
  ran: (night) => night.dutyOfNight,
  heat: (night) => night.heat?.kWh ?? null,
  starts: (night) => night.starts,
  lowest: (night) => night.lowest?.value ?? null,
  outdoors: (night) => night.outdoorsLowest?.value ?? null,
};

/** What is not known stays at the foot, whichever way the column runs. */
function sorted(nights: NightSummary[], { sort, order }: DutyAddress): NightSummary[] {
  const value = sortValue[sort];
  const way = order === 'up' ? 1 : -1;
  return nights.toSorted((a, b) => {
    const [x, y] = [value(a), value(b)];
    if (x === null || y === null) return Number(x === null) - Number(y === null);
    return x === y ? a.night.localeCompare(b.night) : x < y ? -way : way;
  });
}

function columnsOf({ house, address, preferences }: NightsTableProps, hasHeat: boolean): Column[] {
  const column = (key: Sort, label: string, more: Partial<Column> = {}): Column => {
    const isSorted = address.sort === key;
    const order = isSorted && address.order === 'up' ? 'down' : 'up';
    return {
      key,
      label,
      figure: true,
      sort: {
        href: addressOf(house, address, { sort: key, order }),
        order: isSorted ? (address.order === 'up' ? 'ascending' : 'descending') : null,
      },
      ...more,
    };
  };
  const unit = degrees(preferences);
  return [
    column('night', 'night', { figure: false }),
    { key: 'strip', label: <StripAxis clock={preferences.clock} /> },
    column('ran', 'ran'),
    ...(hasHeat ? [column('heat', 'kWh')] : []),
    column('starts', 'starts', { wideOnly: true }),
    column('lowest', `lowest ${unit}`, { wideOnly: true }),
    column('outdoors', `outdoors ${unit}`, { wideOnly: true }),
  ];
}

const cell = 'whitespace-nowrap px-2 py-0 text-right font-mono text-[0.9rem]';

export function NightsTable(props: NightsTableProps) {
  const { house, address, nights, totals, frostLimitC, preferences } = props;
  const hasHeat = totals.heat !== null;
  const figure = (celsius: number) => temperatureFigure(celsius, preferences);
  return (
    <Table
      caption="Nights, noon to noon"
      captionHidden
      columns={columnsOf(props, hasHeat)}
      foot={
        <tr>
          <th scope="row" colSpan={2} className="px-2 py-2 text-left">
            {nights.length === 1 ? 'This night' : `All ${nights.length} nights`}
          </th>
          <td className={cell}>{share(totals.dutyOfNight)}</td>
          {totals.heat === null ? null : <td className={cell}>{decimal(totals.heat.kWh, 1)}</td>}
          <td className={classes(cell, 'max-sm:hidden')}>{totals.starts}</td>
          <td className={classes(cell, 'max-sm:hidden')}>
            {totals.lowest ? figure(totals.lowest.value) : null}
          </td>
          <td className={classes(cell, 'max-sm:hidden')}>
            {totals.outdoorsLowest ? figure(totals.outdoorsLowest.value) : null}
          </td>
        </tr>
      }
    >
      {sorted(nights, address).map((night) => (
        <NightRow
          key={night.night}
          night={night}
          href={`${addressOf(house, address, { night: night.night })}#night`}
          isOpen={night.night === address.night}
          hasHeat={hasHeat}
          isCold={frostLimitC !== null && night.lowest !== null && night.lowest.value < frostLimitC}
          figure={figure}
        />
      ))}
    </Table>
  );
}

function NightRow({
  night,
  href,
  isOpen,
  hasHeat,
  isCold,
  figure,
}: {
  night: NightSummary;
  href: string;
  isOpen: boolean;
  hasHeat: boolean;
  isCold: boolean;
  figure: (celsius: number) => string;
}) {
  const length = (night.ends - night.from) / 1000;
  const unknown = <span className="font-sans text-[0.8rem] text-soft">not known</span>;
  return (
    <tr className={classes('border-b border-faint hover:bg-faint', isOpen && 'bg-faint')}>
      <th scope="row" className="whitespace-nowrap px-2 py-0 text-left font-mono text-[0.9rem] font-normal">
        <Link
          href={href}
          aria-current={isOpen ? 'true' : undefined}
          className="flex min-h-6 items-center underline decoration-line underline-offset-4 hover:decoration-ink aria-[current=true]:font-semibold"
        >
          {nightDate(night.night)}
          {night.complete ? null : <span className="sr-only"> (so far)</span>}
        </Link>
      </th>
      <td className={classes('w-1/2 min-w-32 px-0 py-0.5', QUARTERS)}>
        <span className="flex flex-col gap-0.5">
          {night.strips.map((strip) => (
            <NightStrip key={strip.channel} spans={strip.spans} length={length} />
          ))}
        </span>
      </td>
      <td className={cell}>{share(night.dutyOfNight)}</td>
      {hasHeat ? (
        <td className={cell}>{night.heat === null ? unknown : decimal(night.heat.kWh, 1)}</td>
      ) : null}
      <td className={classes(cell, 'max-sm:hidden')}>{night.starts}</td>
      <td className={classes(cell, 'max-sm:hidden', isCold && 'font-semibold text-alarm')}>
        {night.lowest === null ? unknown : figure(night.lowest.value)}
        {isCold ? <span className="sr-only"> under the frost limit</span> : null}
      </td>
      <td className={classes(cell, 'text-outdoors max-sm:hidden')}>
        {night.outdoorsLowest === null ? unknown : figure(night.outdoorsLowest.value)}
      </td>
    </tr>
  );
}
