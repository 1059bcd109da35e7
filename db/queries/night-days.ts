/** A year of a source's nights, a few figures each: taken out of the kept summaries by the database, not carried whole. */
import { sql } from 'drizzle-orm';
import type { Holding } from '@/db/client';
import { SUMMARY_VERSION } from '@/lib/analysis/nights';

/** What is not known, or not so, is left out: the page sends this for every night of a year. */
export interface NightDay {
  night: string;
  ran: number;
  kWh?: number;
  lowest?: number;
  /** Under the frost limit at some time. */
  isCold?: true;
  isThin?: true;
}

/** Ascending, from the night of this name on. */
export async function readDays(holding: Holding, sourceId: string, from: string): Promise<NightDay[]> {
  const { rows } = await holding.db.execute<{
    night: string;
    ran: number;
    kwh: number | null;
    lowest: number | null;
    below: number | null;
    thin: boolean;
  }>(sql`
    select night::text as night, (body->>'dutyOfNight')::float8 as ran, (body#>>'{heat,kWh}')::float8 as kwh,
      (body#>>'{lowest,value}')::float8 as lowest, (body->>'belowFrostLimitSeconds')::float8 as below,
      (body->>'coverageLow')::boolean as thin
    from night
    where holding_id = ${holding.id} and source_id = ${sourceId} and night >= ${from}::date
      and (body->>'version')::int = ${SUMMARY_VERSION}
    order by night`);
  return rows.map(({ night, ran, kwh: kWh, lowest, below, thin }) => ({
    ...{ night, ran },
    ...(kWh === null ? {} : { kWh }),
    ...(lowest === null ? {} : { lowest }),
    ...((below ?? 0) > 0 ? { isCold: true } : {}),
    ...(thin ? { isThin: true } : {}),
  }));
}
