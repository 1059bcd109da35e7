import { timestamp, uuid } from 'drizzle-orm/pg-core';

/** An instant. Microseconds are cut to milliseconds by the driver, which is all control works with. */
export const instant = (name: string) => timestamp(name, { withTimezone: true, mode: 'date', precision: 3 });

/** First part of every tenant table's key, so that the schema can be spread by holding later. */
export const holdingId = () => uuid('holding_id').notNull();
