// The two demo holdings with a history, without their people: what playHistory is handed by the seed.
import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { everyHolding, everyPool } from '@/db/client';
import { organization } from '@/db/schema/auth';
import { longHouse } from '@/db/seed/long-house';
import { propHouse } from '@/db/seed/prop-house';
import { beckHouse } from '@/db/seed/stonebeck';
import { writeHouse, type SeededHouse } from '@/db/seed/write-house';
import { env } from '@/lib/server/env';
import { playHistory } from '@/worker/jobs/demo-history';

export interface Played {
  larkmoor: string;
  stonebeck: string;
  houses: Map<string, SeededHouse>;
  from: number;
  to: number;
  stateFile: string;
}

/** An evening in December: two nights back is one with plugs out and a person's deeds in it. */
export const TO = Date.parse('2026-12-01T17:20:05.143Z');
const SEED = 20_261_201;

export async function playDemo(hours: number): Promise<Played> {
  const to = TO;
  const from = to - hours * 3_600_000;
  const houses = new Map<string, SeededHouse>();
  const given = [
    { id: randomUUID(), name: 'Larkmoor Growers', demo: [longHouse, propHouse] },
    { id: randomUUID(), name: 'Stonebeck Nursery', demo: [beckHouse] },
  ];
  for (const { id, name, demo } of given) {
    const holding = { id, db: everyHolding() };
    await holding.db.insert(organization).values({ id, name, slug: id });
    for (const house of demo) {
      const seeded = await writeHouse(holding, house, 'owner@larkmoor.example', new Date(from));
      houses.set(seeded.slug, seeded);
    }
  }
  const [larkmoor, stonebeck] = given.map(({ id }) => id);
  if (larkmoor === undefined || stonebeck === undefined) throw new Error('two holdings were given');
  const stateFile = path.join(env().DATA_DIR, `yard-${hours}-${randomUUID()}.json`);
  const of = (slug: string) => houses.get(slug) ?? fail(slug);
  await playHistory(
    [
      { holdingId: larkmoor, houses: [of('long-house'), of('prop-house')] },
      { holdingId: stonebeck, houses: [of('beck-house')] },
    ],
    { from, to, seed: SEED, stateFile },
  );
  return { larkmoor, stonebeck, houses, from, to, stateFile };
}

export function houseId({ houses }: Played, slug: string): string {
  return houses.get(slug)?.houseId ?? fail(slug);
}

/** Rows of a question about one house, which is $1. */
export async function rowsOf<Row extends Record<string, unknown>>(
  played: Played,
  slug: string,
  question: string,
): Promise<Row[]> {
  return (await everyPool().query<Row>(question, [houseId(played, slug)])).rows;
}

/** What of a history must be the same each time: everything but the ids, and the epoch in a number. */
export async function fingerprint(played: Played): Promise<unknown> {
  const ask = (slug: string, question: string) => rowsOf(played, slug, question);
  const parts: unknown[] = [JSON.parse(readFileSync(played.stateFile, 'utf8'))];
  for (const slug of played.houses.keys()) {
    parts.push(
      await ask(
        slug,
        `select p.key, count(*)::int, sum(r.value)::text, sum(r.quality)::int
         from reading r join point p on p.number = r.point where p.house_id = $1 group by 1 order by 1`,
      ),
      await ask(
        slug,
        `select c.key, s.at, s."from", s."to", s.claim, s.number % 4294967296 as count, jsonb_array_length(s.explanation->'ladder') as steps
         from switching s join channel c on c.id = s.channel_id where s.house_id = $1 order by s.at, c.key`,
      ),
      await ask(
        slug,
        'select kind, about, raised_at, cleared_at from alarm where house_id = $1 order by raised_at, kind, about::text',
      ),
    );
  }
  return parts;
}

function fail(slug: string): never {
  throw new Error(`the demo has no house ${slug}`);
}
