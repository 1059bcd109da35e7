import type { Holding } from '@/db/client';
import type { HouseRecord } from '@/db/queries/plan';
import type { HouseRun } from './house-run';

/** One house of the history: as it is driven, and as the database knows it. */
export interface Place {
  run: HouseRun;
  holding: Holding;
  record: HouseRecord;
}
