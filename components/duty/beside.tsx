import { comparable, compareNights, type How } from '@/lib/analysis/compare';
import type { Preferences } from '@/lib/units/preferences';
import { compareNames } from './compare-choices';
import { ComparePanel } from './compare-panel';
import type { DutyHouse, DutyViewData, OtherNights } from './duty-data';

/** The chosen nights beside what they are compared with. */
export function Beside({
  house,
  source,
  data,
  other,
  preferences,
}: {
  house: DutyHouse;
  source: { name: string };
  data: DutyViewData;
  other: OtherNights;
  preferences: Preferences;
}) {
  const chosen = other.kind === 'house' ? other.chosen : data.chosen;
  const comparison = compareNights(comparable(chosen), comparable(other.nights), howOf(other));
  return (
    <ComparePanel
      {...compareNames(house, source, data.chosen, other)}
      comparison={comparison}
      preferences={preferences}
    />
  );
}

function howOf(other: OtherNights): How {
  if (other.kind === 'source') return other.house === null ? 'sources' : 'houses';
  return other.kind === 'house' ? 'houses' : 'ranges';
}
