import { classes } from '@/components/ui/classes';
import { Table, type Column } from '@/components/ui/table';
import type { NightSummary } from '@/lib/analysis/nights';
import type { NightTotals } from '@/lib/analysis/totals';
import { decimal, degrees, share, temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { nightNotes } from '@/lib/wording/duty-notes';
import { addressOf, type DutyAddress, type Sort } from './address';
import { nightLine } from './night-line';
import { NightRows } from './night-rows';
import { AT_ONCE } from './rows-at-once';
import { StripAxis } from './night-strip';
import { sorted } from './sorting';

export interface NightsTableProps {
  house: string;
  address: DutyAddress;
  nights: NightSummary[];
  totals: NightTotals;
  frostLimitC: number | null;
  preferences: Preferences;
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
  const bare = addressOf(house, address, { night: undefined });
  const notes = nightNotes(nights);
  const lines = sorted(nights, address).map((night) => nightLine(night, frostLimitC, preferences));
  return (
    <>
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
        <NightRows
          // a choice of other nights begins from its own first screen
          key={`${address.sort} ${address.order} ${nights[0]?.night ?? ''}`}
          first={lines.slice(0, AT_ONCE)}
          // as text: React would read each part of four hundred nights before anything of the page answers
          later={JSON.stringify(lines.slice(AT_ONCE))}
          count={lines.length}
          to={`${bare}${bare.includes('?') ? '&' : '?'}night=`}
          opened={address.night ?? null}
          hasHeat={hasHeat}
        />
      </Table>
      {notes.map((note) => (
        <p key={note} className="pt-2 text-[0.85rem] text-soft">
          {note}
        </p>
      ))}
    </>
  );
}
