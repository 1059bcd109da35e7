import { Panel } from '@/components/ui/panel';
import type { Preferences } from '@/lib/units/preferences';
import { addressOf, type DutyAddress } from './address';
import type { DutyHouse, DutyViewData } from './duty-data';
import { YearCalendar } from './year-calendar';

/** The nights of a year; the nights' table, with as many nights, is the table behind it. */
export function Year({
  house,
  address,
  data,
  preferences,
}: {
  house: DutyHouse;
  address: DutyAddress;
  data: DutyViewData;
  preferences: Preferences;
}) {
  if (data.year.length < 2) return null;
  const bare = addressOf(house.slug, address, { night: undefined });
  return (
    <Panel title="The year" note="the larger the square, the longer it ran; outlined: under the frost limit">
      <YearCalendar
        // as text, which React takes as it is; of days as objects it would read each part before the page answers
        of={JSON.stringify(data.year)}
        to={`${bare}${bare.includes('?') ? '&' : '?'}night=`}
        preferences={preferences}
      />
    </Panel>
  );
}
