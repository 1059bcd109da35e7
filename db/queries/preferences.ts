import 'server-only';
import { eq } from 'drizzle-orm';
import { everyHolding } from '@/db/client';
import { user } from '@/db/schema/auth';
import { StoredPreferences } from '@/lib/schema/preferences';
import { USUAL, type Preferences } from '@/lib/units/preferences';

/** A person's preferences go with them from holding to holding, so they stand outside row security, by user id alone. */
export async function readPreferences(userId: string): Promise<Preferences> {
  const [row] = await everyHolding()
    .select({ preferences: user.preferences })
    .from(user)
    .where(eq(user.id, userId));
  return parse(row?.preferences ?? null);
}

export async function writePreferences(userId: string, change: Partial<Preferences>): Promise<Preferences> {
  return everyHolding().transaction(async (db) => {
    const [row] = await db
      .select({ preferences: user.preferences })
      .from(user)
      .where(eq(user.id, userId))
      .for('update');
    const next = { ...parse(row?.preferences ?? null), ...change };
    await db
      .update(user)
      .set({ preferences: JSON.stringify(next) })
      .where(eq(user.id, userId));
    return next;
  });
}

function parse(text: string | null): Preferences {
  if (text === null) return USUAL;
  try {
    const read = StoredPreferences.safeParse(JSON.parse(text));
    return read.success ? read.data : USUAL;
  } catch {
    return USUAL;
  }
}
