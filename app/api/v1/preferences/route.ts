import { writePreferences } from '@/db/queries/preferences';
import { Refusal } from '@/db/queries/refusal';
import { serve } from '@/lib/server/guard';
import { putPreferences } from '@/lib/server/operations/people';

const A_YEAR_S = 365 * 86_400;

export const PUT = serve(putPreferences, async ({ caller, body }) => {
  if (caller.userId === null) throw new Refusal(null, 'A program has no preferences; a person has.');
  const { theme, ...units } = body;
  await writePreferences(caller.userId, withoutMissing(units));
  // The theme is the device's: the page reads it from its own cookie before anything is painted.
  const cookie = `theme=${theme ?? ''}; Path=/; Max-Age=${A_YEAR_S}; SameSite=Lax`;
  return theme === undefined ? {} : { headers: { 'set-cookie': cookie } };
});

function withoutMissing<T extends object>(units: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  const given = Object.entries(units).filter(([, value]) => value !== undefined);
  // only keys of `units` are left, each with a value
  return Object.fromEntries(given) as { [K in keyof T]?: Exclude<T[K], undefined> };
}
