import 'server-only';
import type { z } from 'zod';
import type { Holding } from '@/db/client';
import { listNights } from '@/db/queries/night';
import { Refusal } from '@/db/queries/refusal';
import { findSource } from '@/db/queries/source';
import { nightAnswer } from '@/lib/analysis/night-answer';
import { nightsCsv } from '@/lib/analysis/night-csv';
import type { NightsQuery } from '@/lib/schema/night';
import type { House } from '@/lib/schema/yard-view';
import type { Answer } from './guard';

/** Every night there is, where a table is taken away: ten years of four sources. */
const MOST_ROWS = 15_000;

/** Nights, newest first, in JSON by pages or as one CSV file. @throws Refusal at `source` */
export async function nightsAnswer(
  holding: Holding,
  house: House,
  query: z.output<typeof NightsQuery>,
  now: Date,
): Promise<Answer> {
  const { from, to, cursor, format } = query;
  const source = query.source === undefined ? null : await findSource(holding, house.id, query.source);
  if (query.source !== undefined && source === null) {
    throw new Refusal('source', `This house has no source ${JSON.stringify(query.source)}.`);
  }
  const [night, slug] = (cursor ?? '').split(' ');
  const limit = format === 'csv' ? MOST_ROWS : query.limit + 1;
  const ask = {
    limit,
    ...(source === null ? {} : { sources: [source.slug] }),
    ...(from === undefined ? {} : { from }),
    ...(to === undefined ? {} : { to }),
    ...(night === undefined || slug === undefined ? {} : { after: { night, source: slug } }),
  };
  const rows = await listNights(holding, house.id, ask, now.getTime());
  if (format === 'csv') {
    const text = nightsCsv(rows, house.zone);
    return { file: { type: 'text/csv', name: `${house.slug}-nights.csv`, text } };
  }
  const shown = rows.slice(0, query.limit);
  const last = shown.at(-1);
  return {
    body: {
      items: shown.map((row) => nightAnswer(row, house.zone)),
      next: rows.length > shown.length && last !== undefined ? `${last.night} ${last.source}` : null,
    },
  };
}
