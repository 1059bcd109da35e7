import { integer, timestamp, uuid } from 'drizzle-orm/pg-core';

/** An instant. Microseconds are cut to milliseconds by the driver, which is all control works with. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date', precision: 3 });

/** First part of every tenant table's key, so that the schema can be spread by holding later. */
export const holdingId = () => uuid('holding_id').notNull();

/** Things of the yard are taken out of use, never deleted: what they did must stay explainable. */
export const removedAt = () => instant('removed_at');
export const revision = () => integer('revision').notNull().default(1);
export const createdAt = () => instant('created_at').notNull().defaultNow();
