import { z } from 'zod';
import { fixedOffset } from '@/lib/analysis/logger-clock';
import { DELIMITERS, ENCODINGS } from '@/lib/analysis/logger-layout';
import { DATE_ORDERS, SKIPPED, TWICE } from '@/lib/analysis/logger-time';
import { FILE_UNITS, isFileUnit, type FileUnitKey } from '@/lib/units/file-units';
import { Instant, isSeen, Key, listOf, SEEN, Zone } from './common';

export const LARGEST_FILE = 200 * 1024 ** 2;
/** A file is sent in pieces, so that a broken line costs one of them and each goes through the guard like any other. */
export const LARGEST_PIECE = 4 * 1024 ** 2;

export const ImportCreate = z.strictObject({
  name: z
    .string()
    .trim()
    .min(1, 'Give the file’s name.')
    .max(200, 'At most 200 characters.')
    .refine(isSeen, SEEN),
  bytes: z
    .number()
    .int()
    .min(1, 'This file is empty; choose one that is not.')
    .max(LARGEST_FILE, 'At most 200 MiB; split the file by seasons and bring the parts in one by one.'),
});

export const PieceQuery = z.strictObject({
  from: z.coerce.number({ error: 'Give the byte at which this piece begins.' }).int().min(0),
});

const column = z.number().int().min(0).max(999);
const Unit = z.custom<FileUnitKey>(
  (value) => typeof value === 'string' && isFileUnit(value),
  `Give one of ${Object.keys(FILE_UNITS).join(', ')}.`,
);

const FileZone = z
  .string()
  .trim()
  .refine(
    (value) => fixedOffset(value) !== null || Zone.safeParse(value).success,
    'Name an IANA time zone, such as Europe/London, or a fixed offset, such as UTC+01:00.',
  );

export const ImportLayout = z.strictObject({
  encoding: z.enum(ENCODINGS),
  delimiter: z.enum(DELIMITERS),
  decimal: z.enum(['.', ',']),
  headLines: z.number().int().min(0, 'At least 0.').max(1000, 'At most 1000 lines.'),
  timeColumns: z.array(column).min(1, 'Choose the column with the time.').max(2, 'At most date and time.'),
  /** Of a table with a line a sensor: the column that names it. */
  sensorColumn: column.optional(),
  time: z.strictObject({
    order: z.enum(DATE_ORDERS),
    zone: FileZone,
    twice: z.enum(TWICE),
    skipped: z.enum(SKIPPED),
  }),
  columns: z
    .array(
      z.strictObject({
        ...{ column, point: Key, unit: Unit.meta({ type: 'string' }) },
        sensor: z.string().min(1).max(200).optional(),
      }),
    )
    .min(1, 'Choose a point for one column at least.')
    .max(200, 'At most 200 columns.'),
});
export type ImportLayout = z.infer<typeof ImportLayout>;

export const IMPORT_STATES = [
  'receiving',
  'received',
  'to-check',
  'checked',
  'to-bring',
  'done',
  'to-undo',
  'undone',
  'failed',
] as const;
export type ImportState = (typeof IMPORT_STATES)[number];

const Fault = z.strictObject({ line: z.number(), text: z.string(), why: z.string() });
const Doubt = z.strictObject({
  line: z.number(),
  text: z.string(),
  kind: z.enum(['twice', 'skipped']),
  readAs: Instant.nullable(),
});

/** What looking a file through found. */
export const ImportFound = z.strictObject({
  lines: z.number(),
  readings: z.number(),
  outside: z.number(),
  from: Instant.nullable(),
  to: Instant.nullable(),
  faults: z.number(),
  firstFaults: z.array(Fault),
  doubts: z.number(),
  firstDoubts: z.array(Doubt),
});
export type ImportFound = z.infer<typeof ImportFound>;

export const Import = z.strictObject({
  id: z.string(),
  name: z.string(),
  bytes: z.number(),
  received: z.number(),
  state: z.enum(IMPORT_STATES),
  layout: ImportLayout.nullable(),
  found: ImportFound.nullable(),
  /** Of the work under way, from 0 to 1. */
  progress: z.number(),
  brought: z.number(),
  duplicates: z.number(),
  faults: z.number(),
  problem: z.string().nullable(),
  by: z.string(),
  createdAt: Instant,
  endedAt: Instant.nullable(),
});
export type Import = z.infer<typeof Import>;
export const ImportList = listOf(Import);

const PreviewColumn = z.strictObject({
  column: z.number(),
  head: z.string(),
  sample: z.array(z.string()),
  unit: z.string().nullable(),
  isTime: z.boolean(),
  /** Of a table with a line a sensor: whose lines these are. */
  sensor: z.string().nullable(),
});

/** The file's first lines as they are understood; `times` of the lines, as they would be read by `layout`. */
export const ImportPreview = z.strictObject({
  layout: z.strictObject({ ...ImportLayout.shape, columns: z.array(ImportLayout.shape.columns.element) }),
  columns: z.array(PreviewColumn),
  /** Of every column of the file. */
  heads: z.array(z.string()),
  times: z.array(Instant),
  faults: z.array(Fault),
  doubts: z.array(z.string()),
});
export type ImportPreview = z.infer<typeof ImportPreview>;

/** Left out, the file is understood afresh; given, it is shown as these settings would have it. */
export const PreviewAsk = z.strictObject({ layout: ImportPreview.shape.layout.optional() });
