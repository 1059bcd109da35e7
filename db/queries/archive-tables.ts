/**
 * What of the schema goes into an archive, and what does not. A structure test holds this list equal to the tables that
 * carry a holding: a new table is put in here, or left out with its reason.
 */
import { getTableConfig, type PgColumn, type PgTable } from 'drizzle-orm/pg-core';
import { schema } from '@/db/client';

export interface ArchiveTable {
  table: PgTable;
  name: string;
  /** It goes out to be read, and is not brought in again, for this reason. */
  outOnly?: string;
  /** Columns that stay here: secrets, bytes that go as files, and what the new house begins afresh. */
  without?: readonly string[];
  /** Columns that name a row of another table, where the schema has no foreign key for it. */
  refs?: Record<string, string>;
  /** Rows are ordered by `id`, each once. */
  byId: boolean;
  /** SQL that tells which rows go. */
  only?: string;
}

type Given = Omit<ArchiveTable, 'table' | 'name' | 'byId'>;
type TableKey = keyof typeof schema;

/** Parents before what names them. */
const GIVEN: [TableKey, Given][] = [
  ['house', { without: ['plan_revision', 'laid_up_at'] }],
  [
    'node',
    {
      without: [
        ...['token_hash', 'former_token_hash', 'former_token_until', 'bus_secret'],
        ...['status', 'last_heard_at'],
      ],
    },
  ],
  ['point', { refs: { node_id: 'node' } }],
  ['calibration', {}],
  ['source', { refs: { core_point_id: 'point', base_point_id: 'point' } }],
  ['channel', { refs: { source_id: 'source' } }],
  [
    'loop',
    {
      refs: {
        ...{ source_id: 'source', channel_id: 'channel' },
        ...{ intake_point_id: 'point', return_point_id: 'point' },
      },
    },
  ],
  ['interlock', { refs: { channel_id: 'channel', other_id: 'channel' } }],
  ['lockout', { refs: { channel_id: 'channel' } }],
  ['proof', { refs: { channel_id: 'channel' } }],
  ['rule', { refs: { channel_id: 'channel' } }],
  ['ruleVersion', {}],
  ['heapMaterial', {}],
  ['heapEntry', {}],
  ['attachment', { without: ['image', 'thumbnail'] }],
  ['probeSet', {}],
  ['heapJob', {}],
  ['findingDismissal', {}],
  ['moneyBook', {}],
  ['heapCost', {}],
  ['reportSchedule', {}],
  ['reportSent', {}],
  ['alarm', { refs: { house_id: 'house' } }],
  ['alarmEvent', {}],
  ['importBatch', { only: `state in ('done', 'undone', 'failed')` }],
  [
    'importPart',
    { only: `batch_id in (select id from import_batch where state in ('done', 'undone', 'failed'))` },
  ],
  ['nodeLog', { refs: { house_id: 'house' } }],
  ['switching', { refs: { channel_id: 'channel', rule_id: 'rule' } }],
  ['decision', { refs: { channel_id: 'channel' } }],
  ['relayReport', { refs: { channel_id: 'channel' } }],
  ['night', { outOnly: 'Nights are made anew out of the readings and switchings.' }],
  ['houseNight', { outOnly: 'Nights are made anew out of the readings and switchings.' }],
  ['personCommand', { outOnly: 'What people once ordered by hand is not ordered a second time.' }],
  [
    'auditLog',
    { outOnly: 'The audit log tells what was done where it was kept; the new holding begins its own.' },
  ],
];

/** Tables of a holding that stay here whole, with the reason that the page and the document give. */
export const STAYS: Partial<Record<TableKey, string>> = {
  apiKey: 'keys of programs',
  calendarLink: 'secret addresses of calendars',
  idempotency: 'answers kept for a day against doubled requests',
  controlMemory: 'the control’s memory of its last step',
  testRead: 'test readings of boards',
  archive: 'the list of archives themselves',
};

/** Said in every manifest. */
export const LEFT_OUT: readonly string[] = [
  'passwords, sessions and invitations: people are listed by name, e-mail and role, and are invited anew',
  'tokens of field nodes, and passwords of brokers',
  'settings of the mail server',
  ...Object.values(STAYS),
  'roll-ups of readings, which are made anew',
];

export const ARCHIVE_TABLES: readonly ArchiveTable[] = GIVEN.map(([key, given]) => {
  const table: PgTable = schema[key];
  const { name, columns } = getTableConfig(table);
  return { ...given, table, name, byId: columns.some((column) => column.name === 'id') };
});

/** Columns as they stand in the archive. The holding is the manifest's, so it is not said again in each row. */
export function columnsOf(one: ArchiveTable): PgColumn[] {
  const without = new Set(['holding_id', ...(one.without ?? [])]);
  return getTableConfig(one.table).columns.filter((column) => !without.has(column.name));
}

/** By column, the table that it names a row of: the schema's foreign keys, and those said above. */
export function refsOf(one: ArchiveTable): Map<string, string> {
  const refs = new Map(Object.entries(one.refs ?? {}));
  for (const key of getTableConfig(one.table).foreignKeys) {
    const { columns, foreignColumns, foreignTable } = key.reference();
    columns.forEach((column, place) => {
      if (foreignColumns[place]?.name === 'id' && column.name !== 'holding_id')
        refs.set(column.name, getTableConfig(foreignTable).name);
    });
  }
  return refs;
}
