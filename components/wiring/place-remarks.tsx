'use client';
import type { UseFormReturn } from 'react-hook-form';
import { Notice } from '@/components/ui/notice';
import { placeFindings } from '@/lib/analysis/place';
import type { Preferences } from '@/lib/units/preferences';
import { placeWords } from '@/lib/wording/place';
import { houseGroups } from './forms/house';
import { bodyOf } from './spec';

/** What of the place that is being typed wants a second look. It never keeps anybody from saving. */
export function PlaceRemarks({ form, preferences }: { form: UseFormReturn; preferences: Preferences }) {
  const { body } = bodyOf(houseGroups, form.watch(), preferences);
  const { latitude, longitude, altitude, zone } = body;
  if (typeof latitude !== 'number' || typeof longitude !== 'number' || typeof zone !== 'string') return null;
  const found = placeFindings({
    ...{ latitude, longitude, zone },
    altitude: typeof altitude === 'number' ? altitude : 1,
  });
  return (
    <div aria-live="polite" className="empty:hidden">
      {found.length === 0 ? null : (
        <Notice tone="warn" title="Look at the place once more">
          <ul className="flex flex-col gap-1">
            {found.map((one) => (
              <li key={one}>{placeWords(one)}</li>
            ))}
          </ul>
        </Notice>
      )}
    </div>
  );
}
