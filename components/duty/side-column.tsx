import { Figures, Panel } from '@/components/ui/panel';
import type { Preferences } from '@/lib/units/preferences';
import { CoreAtDawn, dawnsOf } from './core-at-dawn';
import type { DutyHouse, DutyViewData } from './duty-data';
import { nightFigures } from '@/lib/wording/duty-figures';
import { RecoveryPanel } from './recovery-panel';

/** Beside the nights: how the heap comes back, its core, and all of them together. */
export function SideColumn({
  house,
  data,
  preferences,
}: {
  house: DutyHouse;
  data: DutyViewData;
  preferences: Preferences;
}) {
  const { chosen, recovery, marks } = data;
  const dawns = dawnsOf(chosen);
  return (
    <div className="flex min-w-0 flex-col gap-4 print:mt-4">
      {recovery === null ? null : (
        <RecoveryPanel recovery={recovery} zone={house.zone} preferences={preferences} />
      )}
      {dawns.length === 0 ? null : (
        <Panel title="Core at dawn">
          <CoreAtDawn dawns={dawns} marks={marks} zone={house.zone} preferences={preferences} />
        </Panel>
      )}
      <Panel title={chosen.length === 1 ? 'This night' : 'Together'}>
        <Figures rows={nightFigures(chosen, house.zone, house.frostLimit, preferences)} />
      </Panel>
    </div>
  );
}
