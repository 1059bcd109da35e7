/** What Duty is made of, as the page hands it in. */
import type { HouseNight, NightSummary } from '@/lib/analysis/nights';
import type { DutyPlace } from './compare-choices';
import type { OpenedData } from './opened-night';
import type { RecoveryData } from './recovery-panel';
import type { YearDay } from './year-layout';

export type OtherNights =
  | { kind: 'ranges'; nights: NightSummary[] }
  | { kind: 'source'; name: string; house: string | null; nights: NightSummary[] }
  | { kind: 'house'; name: string; chosen: HouseNight[]; nights: HouseNight[] };

export interface DutyViewData {
  sources: { slug: string; name: string }[];
  source: { slug: string; name: string; kind: string } | null;
  kept: { first: string; last: string; count: number } | null;
  /** Ascending, of all that may be chosen; and of these those that are. */
  nights: NightSummary[];
  chosen: NightSummary[];
  marks: { at: number; kind: string }[];
  opened: OpenedData | null;
  places: DutyPlace[];
  other: OtherNights | null;
  /** Null for what is not a store: a heater does not come back. */
  recovery: RecoveryData | null;
  year: YearDay[];
}

export interface DutyHouse {
  slug: string;
  name: string;
  zone: string;
  frostLimit: number | null;
}
