/** A year of a source's nights, a few figures each: taken out of the kept summaries by the database, not carried whole. */
import { sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { SUMMARY_VERSION } from '@/lib/analysis/nights';

export interface NightDay {
  night: string;
  ran: number;
  kWh: number | null;
  lowest: number | null;
  /** Under the frost limit at some time. */
  isCold: boolean;
  isThin: boolean;
}

/** Ascending, from the night of this name on. */
export async function readDays(holding: Holding, sourceId: string, from: string): Promise<NightDay[]> {
  const { rows } = await holding.db.execute<{
    night: string;
    ran: number;
    kwh: number | null;
    lowest: number | null;
    below: number;
    thin: boolean;
  }>(sql`
    select night::text as night, (body->>'dutyOfNight')::float8 as ran, (body#>>'{heat,kWh}')::float8 as kwh,
      (body#>>'{lowest,value}')::float8 as lowest, (body->>'belowFrostLimitSeconds')::float8 as below,
      (body->>'coverageLow')::boolean as thin
    from night
    where holding_id = ${holding.id} and source_id = ${sourceId} and night >= ${from}::date
      and (body->>'version')::int = ${SUMMARY_VERSION}
    order by night`);
  return rows.map(({ night, ran, kwh: kWh, lowest, below, thin: isThin }) => ({
    ...{ night, ran, kWh, lowest, isThin },
    isCold: below > 0,
  }));
}
