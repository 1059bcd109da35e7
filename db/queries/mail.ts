import { desc, eq } from 'drizzle-orm';
import { v7 } from 'uuid';
import type { Db } from '@/db/client';
import { sinkMessage } from '@/db/schema/people';

export interface SinkMessage {
  id: string;
  at: number;
  from: string;
  to: string;
  subject: string;
  text: string;
}

/** Keeps a message that the local sink took instead of sending it. */
export async function keepSinkMessage(db: Db, message: Omit<SinkMessage, 'id'>): Promise<void> {
  await db.insert(sinkMessage).values({ ...message, id: v7(), at: new Date(message.at) });
}

/** Newest first; only one address's where `to` is given. */
export async function listSinkMessages(
  db: Db,
  to: string | null = null,
  limit = 100,
): Promise<SinkMessage[]> {
  const rows = await db
    .select()
    .from(sinkMessage)
    .where(to === null ? undefined : eq(sinkMessage.to, to))
    .orderBy(desc(sinkMessage.at))
    .limit(limit);
  return rows.map((row) => ({ ...row, at: row.at.getTime() }));
}
