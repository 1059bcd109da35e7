import 'server-only';
import type { z } from 'zod';
import { inHolding, type Holding } from '@/db/client';
import { listHeapEntries } from '@/db/queries/heap-entry';
import { listProbeSets } from '@/db/queries/probe-set';
import type { Place } from '@/lib/schema/common';
import type { HeapBookExport } from '@/lib/schema/export';
import type { House } from '@/lib/schema/yard-view';
import { csvLine } from '@/lib/units/csv';
import { csvFile } from './csv-file';
import type { Answer } from './guard';
import { isoIn } from './wire';

const ROWS_A_PAGE = 500;

/** Newest first, as the book is. */
export function heapBookFile(holding: Holding, house: House, query: z.output<typeof HeapBookExport>): Answer {
  return csvFile(house, 'heap-book', heapBookParts(holding.id, house, query.source));
}

const HEAP_COLUMNS = [
  ...['at', 'heap', 'kind', 'text', 'materials', 'water_L', 'volume_m3', 'smell', 'squeeze'],
  ...['photographs', 'by', 'entered_at', 'amended_by', 'amended_at'],
];

async function* heapBookParts(
  holdingId: string,
  house: House,
  source: string | undefined,
): AsyncGenerator<string> {
  yield csvLine(HEAP_COLUMNS);
  const iso = isoOf(house);
  for await (const items of allPages((cursor) =>
    inHolding(holdingId, (holding) =>
      listHeapEntries(holding, house.id, { limit: ROWS_A_PAGE, cursor, source }),
    ),
  ))
    yield items
      .map((entry) =>
        csvLine([
          ...[iso(entry.at), entry.source, entry.kind, entry.text, materialText(entry.materials)],
          ...[entry.litresOfWater, entry.volume, entry.smell, entry.squeeze, entry.photographs.length],
          ...[entry.by, iso(entry.enteredAt), entry.amendedBy, iso(entry.amendedAt)],
        ]),
      )
      .join('');
}

/** A line a place, newest round first. */
export function probeRoundsFile(
  holding: Holding,
  house: House,
  query: z.output<typeof HeapBookExport>,
): Answer {
  return csvFile(house, 'probe-rounds', probeRoundParts(holding.id, house, query.source));
}

const ROUND_COLUMNS = [
  ...['at', 'heap', 'column', 'row', 'temperature_Cel', 'left', 'right', 'text'],
  ...['by', 'entered_at', 'amended_by', 'amended_at'],
];

async function* probeRoundParts(
  holdingId: string,
  house: House,
  source: string | undefined,
): AsyncGenerator<string> {
  yield csvLine(ROUND_COLUMNS);
  const iso = isoOf(house);
  for await (const items of allPages((cursor) =>
    inHolding(holdingId, (holding) =>
      listProbeSets(holding, house.id, { limit: ROWS_A_PAGE, cursor, source }),
    ),
  ))
    yield items
      .flatMap((round) =>
        round.places.map((place) =>
          csvLine([
            ...[iso(round.at), round.source, place.column + 1, place.row + 1],
            ...[place.celsius, round.section.left, round.section.right, round.text],
            ...[round.by, iso(round.enteredAt), round.amendedBy, iso(round.amendedAt)],
          ]),
        ),
      )
      .join('');
}

const isoOf = (house: House) => (at: string | null) =>
  at === null ? null : isoIn(house.zone, Date.parse(at));

/** Page after page of a list that is told newest first. */
async function* allPages<Item extends { id: string; at: string }>(
  read: (cursor: Place | undefined) => Promise<{ items: Item[]; next: unknown }>,
): AsyncGenerator<Item[]> {
  let cursor: Place | undefined;
  for (;;) {
    const { items, next } = await read(cursor);
    yield items;
    const last = items.at(-1);
    if (next === null || last === undefined) return;
    cursor = { id: last.id, at: Date.parse(last.at) };
  }
}

/** All that is known of a material, so that nothing of the book is lost in the table. */
function materialText(materials: readonly object[]): string {
  return materials
    .map((one) =>
      Object.entries(one)
        .filter(([, value]) => value !== null && value !== undefined)
        .map(([name, value]) => `${name} ${String(value)}`)
        .join(' '),
    )
    .join('; ');
}
