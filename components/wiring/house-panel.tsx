import { ButtonLink } from '@/components/ui/button';
import { Figures, Panel } from '@/components/ui/panel';
import type { House } from '@/lib/schema/yard-view';
import { altitude, decimal, temperature } from '@/lib/units/format';
import { day } from '@/lib/units/time';
import type { Preferences } from '@/lib/units/preferences';
import { LAST_RESORT_CAUTION } from '@/lib/wording/wiring-parts';
import { ChangeButton } from './editing';

/** Where the house stands, and at what cold it acts and wakes somebody. */
export function HousePanel({
  house,
  preferences,
  mayAdd,
}: {
  house: House;
  preferences: Preferences;
  mayAdd: boolean;
}) {
  const degree = (value: number, plus: string, minus: string) =>
    `${decimal(Math.abs(value), 2)}° ${value < 0 ? minus : plus}`;
  return (
    <Panel title="House" actions={<ChangeButton kind="house" id={house.id} of={house.name} />}>
      <Figures
        rows={[
          { name: 'Name', value: <span className="font-sans">{house.name}</span> },
          { name: 'Time zone', value: <span className="font-sans">{house.zone}</span> },
          {
            name: 'Place',
            value: `${degree(house.latitude, 'N', 'S')}, ${degree(house.longitude, 'E', 'W')}`,
          },
          { name: 'Altitude', value: altitude(house.altitude, preferences) },
          {
            name: 'Frost help below',
            value:
              house.frostLimit === null ? (
                <span className="font-sans text-warn">none</span>
              ) : (
                temperature(house.frostLimit, preferences)
              ),
          },
          {
            name: 'Wakes somebody below',
            value:
              house.frostAlarm === null ? (
                <span className="font-sans text-warn">nobody is woken</span>
              ) : (
                temperature(house.frostAlarm, preferences)
              ),
          },
          {
            name: 'Thermostat of last resort',
            value:
              house.lastResort === null ? (
                <span className="font-sans text-warn">none</span>
              ) : (
                `below ${temperature(house.lastResort.below, preferences)}`
              ),
            note:
              house.lastResort === null
                ? undefined
                : house.lastResort.provedOn === null
                  ? 'nobody saw it work yet'
                  : `seen to work on ${dayOf(house.lastResort.provedOn)}`,
          },
        ]}
      />
      <p className="mt-2 border-l-4 border-warn pl-3 text-[0.9rem] text-soft">{LAST_RESORT_CAUTION}</p>
      {mayAdd ? (
        <ButtonLink kind="quiet" href="/new-house" className="-ml-4">
          Add another house
        </ButtonLink>
      ) : null}
    </Panel>
  );
}

/** A date alone, which is the same day in every zone. */
const dayOf = (date: string) => day(Date.parse(`${date}T12:00:00Z`), 'UTC');
