import { sql } from 'drizzle-orm';
import {
  check,
  customType,
  date,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { holdingId, instant } from './columns';
import { organization } from './auth';
import { source } from './channel';
import { point } from './node';
import { proof } from './proof';

const revision = () => integer('revision').notNull().default(1);
/** Who wrote a row and when, by app time; an amendment stays beside it. */
const written = () => ({
  by: text('by').notNull(),
  enteredAt: instant('entered_at').notNull(),
  amendedBy: text('amended_by'),
  amendedAt: instant('amended_at'),
  revision: revision(),
});

export const heapEntry = pgTable(
  'heap_entry',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: uuid('source_id').notNull(),
    kind: text('kind').notNull(),
    at: instant('at').notNull(),
    text: text('text').notNull(),
    materials: jsonb('materials')
      .$type<{ material: string; kilograms?: number; litres?: number }[]>()
      .notNull(),
    litresOfWater: doublePrecision('litres_of_water'),
    volumeM3: doublePrecision('volume_m3'),
    /** What nose and hand found: a word of lib/schema/heap.ts, null where it was not tried. */
    smell: text('smell'),
    squeeze: text('squeeze'),
    ...written(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('heap_entry_at').on(table.holdingId, table.sourceId, table.at),
  ],
);

const ofHeap = () => uuid('source_id').notNull();
const bytes = customType<{ data: Buffer }>({ dataType: () => 'bytea' });

/** Materials of the holding's own; the common ones stand in lib/analysis/common-materials.ts. */
export const heapMaterial = pgTable(
  'heap_material',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    name: text('name').notNull(),
    /** kg/m³ as it comes, loose */
    densityKgPerM3: doublePrecision('density_kg_per_m3'),
    /** Water as a share of the wet mass. */
    moisture: doublePrecision('moisture').notNull(),
    /** Shares of the dry mass. */
    carbon: doublePrecision('carbon').notNull(),
    nitrogen: doublePrecision('nitrogen').notNull(),
    /** Where the figures come from. */
    from: text('from').notNull(),
    ...written(),
    removedAt: instant('removed_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('heap_material_name')
      .on(table.holdingId, sql`lower(${table.name})`)
      .where(sql`removed_at is null`),
  ],
);

/**
 * Photographs of an entry, a point or a proof, as they were made anew here: without the place, the camera and all else a
 * file carries.
 */
export const attachment = pgTable(
  'attachment',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    /** One of the three: what the picture belongs to. */
    entryId: uuid('entry_id'),
    pointId: uuid('point_id'),
    proofId: uuid('proof_id'),
    /** Of a point's or a proof's: what it shows. */
    shows: text('shows').$type<'place' | 'shield' | 'plate' | 'wiring'>(),
    by: text('by').notNull(),
    enteredAt: instant('entered_at').notNull(),
    widthPx: integer('width_px').notNull(),
    heightPx: integer('height_px').notNull(),
    image: bytes('image').notNull(),
    thumbnail: bytes('thumbnail').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.entryId],
      foreignColumns: [heapEntry.holdingId, heapEntry.id],
    }).onDelete('cascade'),
    foreignKey({
      columns: [table.holdingId, table.pointId],
      foreignColumns: [point.holdingId, point.id],
    }).onDelete('cascade'),
    foreignKey({
      columns: [table.holdingId, table.proofId],
      foreignColumns: [proof.holdingId, proof.id],
    }).onDelete('cascade'),
    index('attachment_entry').on(table.holdingId, table.entryId),
    index('attachment_point').on(table.holdingId, table.pointId),
    index('attachment_proof').on(table.holdingId, table.proofId),
    check('attachment_of_one', sql`num_nonnulls(entry_id, point_id, proof_id) = 1`),
  ],
);

/** A round with the probe: what it read at which places of a section. */
export const probeSet = pgTable(
  'probe_set',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: ofHeap(),
    at: instant('at').notNull(),
    /** Of the section in which the places lie; a heap sinks, so each round has its own. */
    section: jsonb('section').$type<Record<string, unknown>>().notNull(),
    places: jsonb('places').$type<{ column: number; row: number; celsius: number }[]>().notNull(),
    text: text('text').notNull(),
    ...written(),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('probe_set_at').on(table.holdingId, table.sourceId, table.at),
  ],
);

/** What a heap asks for in the course of the year, with its list; in the calendar feed too. */
export const heapJob = pgTable(
  'heap_job',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: ofHeap(),
    kind: text('kind').notNull(),
    title: text('title').notNull(),
    dueOn: date('due_on', { mode: 'string' }).notNull(),
    checklist: jsonb('checklist')
      .$type<{ text: string; doneAt: string | null; doneBy: string | null }[]>()
      .notNull(),
    doneAt: instant('done_at'),
    doneBy: text('done_by'),
    ...written(),
    removedAt: instant('removed_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('heap_job_due').on(table.holdingId, table.sourceId, table.dueOn),
  ],
);

/** A finding that somebody set aside, with the evidence it then stood on: other evidence brings it back. */
export const findingDismissal = pgTable(
  'finding_dismissal',
  {
    holdingId: holdingId(),
    id: uuid('id').notNull(),
    sourceId: ofHeap(),
    kind: text('kind').notNull(),
    mark: text('mark').notNull(),
    level: doublePrecision('level').notNull(),
    why: text('why').notNull(),
    by: text('by').notNull(),
    at: instant('at').notNull(),
    takenBackAt: instant('taken_back_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    foreignKey({
      columns: [table.holdingId, table.sourceId],
      foreignColumns: [source.holdingId, source.id],
    }).onDelete('cascade'),
    index('finding_dismissal_at').on(table.holdingId, table.sourceId, table.at),
  ],
);

/** The secret address under which one person's calendar reads the jobs: only its hash is kept. */
export const calendarLink = pgTable(
  'calendar_link',
  {
    holdingId: holdingId().references(() => organization.id, { onDelete: 'cascade' }),
    id: uuid('id').notNull(),
    userId: uuid('user_id').notNull(),
    hash: text('hash').notNull(),
    createdAt: instant('created_at').notNull(),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (table) => [
    primaryKey({ columns: [table.holdingId, table.id] }),
    uniqueIndex('calendar_link_hash').on(table.hash),
  ],
);
