/** What tables whose rows belong to a house have in common; apart from the tables, which are listed by their modules. */
import { type AnyPgColumn, foreignKey, uuid } from 'drizzle-orm/pg-core';
import { house } from './house';

/** The column that says which house a row belongs to; `inHouse` is its key. */
export const ofHouse = () => uuid('house_id').notNull();

/** A row of a house goes with it. */
export const inHouse = <T extends string>(table: {
  holdingId: AnyPgColumn<{ tableName: T }>;
  houseId: AnyPgColumn<{ tableName: T }>;
}) =>
  foreignKey({
    columns: [table.holdingId, table.houseId],
    foreignColumns: [house.holdingId, house.id],
  }).onDelete('cascade');
