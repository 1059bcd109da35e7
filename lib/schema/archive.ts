/** A whole holding as one file: what its manifest says, and what the interface tells of one on its way out or in. */
import { z } from 'zod';
import { Instant, listOf, Name } from './common';

export const ARCHIVE_FORMAT = 'middenward-archive';
/** Of the form of the file. What its tables hold goes by the schema's number. */
export const ARCHIVE_VERSION = 1;
export const LARGEST_ARCHIVE = 4 * 1024 ** 3;
export const LARGEST_MANIFEST = 4 * 1024 ** 2;

export const MANIFEST = 'manifest.json';
export const PEOPLE = 'people.jsonl';
export const READINGS_HEAD = 'point,at,value,quality';
export const QUALITIES = ['good', 'uncertain', 'bad'] as const;

export const tablePath = (table: string) => `tables/${table}.jsonl`;
export const readingsPath = (month: string) => `readings/${month}.csv`;
export const photographPath = (id: string) => `photographs/${id}.jpg`;

const count = z.number().int().min(0).max(Number.MAX_SAFE_INTEGER);

export const ManifestFile = z.strictObject({
  path: z.string().min(1).max(200),
  bytes: count,
  /** Rows; the head of a CSV is none. Null for a photograph. */
  rows: count.nullable(),
  sha256: z.string().regex(/^[0-9a-f]{64}$/, 'Give the SHA-256 in 64 hexadecimal digits.'),
});
export type ManifestFile = z.infer<typeof ManifestFile>;

/** What does not vary with the version comes first, so that an archive of a later one can be told from rubbish. */
export const ManifestHead = z.object({
  format: z.literal(ARCHIVE_FORMAT),
  version: z.number().int().min(1),
});

export const Manifest = z.strictObject({
  format: z.literal(ARCHIVE_FORMAT),
  version: z.literal(ARCHIVE_VERSION),
  /** How many migrations the database had that it was made of. */
  schema: z.number().int().min(1).max(100_000),
  madeAt: Instant,
  holding: z.strictObject({ name: Name, slug: z.string().max(200) }),
  leftOut: z.array(z.string().max(500)).max(100),
  files: z.array(ManifestFile).max(20_000),
});
export type Manifest = z.infer<typeof Manifest>;

export const PersonRow = z.strictObject({
  name: z.string().max(200),
  email: z.string().max(320),
  role: z.string().max(40),
  since: Instant,
});
export type PersonRow = z.infer<typeof PersonRow>;

/** What is inside, told before anything is put in. */
export const ArchiveFound = z.strictObject({
  holding: z.string(),
  madeAt: Instant,
  schema: z.number(),
  /** Names of the houses that are in use, as people know them. */
  houses: z.array(z.string()),
  /** Rows by table. */
  rows: z.record(z.string(), z.number()),
  readings: z.number(),
  /** The first and the last month of readings; null without any. */
  months: z.strictObject({ from: z.string(), to: z.string() }).nullable(),
  photographs: z.number(),
  people: z.array(PersonRow),
});
export type ArchiveFound = z.infer<typeof ArchiveFound>;

export const ARCHIVE_STATES = [
  'asked',
  'sending',
  'sent',
  'broken-off',
  'receiving',
  'to-check',
  'checked',
  'to-bring',
  'done',
  'failed',
] as const;
export type ArchiveState = (typeof ARCHIVE_STATES)[number];

export const Archive = z.strictObject({
  id: z.string(),
  way: z.enum(['out', 'in']),
  state: z.enum(ARCHIVE_STATES),
  name: z.string(),
  bytes: z.number(),
  received: z.number(),
  /** Of the work under way, from 0 to 1. */
  progress: z.number(),
  found: ArchiveFound.nullable(),
  into: z.strictObject({ id: z.string(), name: z.string() }).nullable(),
  problem: z.string().nullable(),
  by: z.string(),
  createdAt: Instant,
  endedAt: Instant.nullable(),
});
export type Archive = z.infer<typeof Archive>;
export const ArchiveList = listOf(Archive);

export const ArchiveSend = z.strictObject({
  name: z.string().trim().min(1, 'Give the file’s name.').max(200, 'At most 200 characters.'),
  bytes: z
    .number()
    .int()
    .min(1, 'This file is empty; choose one that is not.')
    .max(LARGEST_ARCHIVE, 'At most 4 GiB.'),
});

export const ArchiveBring = z.strictObject({ name: Name });

export const InService = z.strictObject({
  /** Some rules in force drive channels whose wiring nobody has proved here. */
  acceptUnproved: z.boolean().optional(),
});
