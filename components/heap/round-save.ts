/** Saves a probe round: a new one by way of the outbox, an amended one at once. */
import { send } from '@/components/ui/send';
import { toLocal } from '@/lib/units/local-time';
import { outcomeOf, type Saved } from './entry-save';
import { newId } from './outbox';
import type { RoundTarget } from './round-target';
import { writeDown } from './write-down';

export async function saveRound(
  { house, zone, owner, round }: RoundTarget,
  body: Record<string, unknown>,
  now: number,
): Promise<Saved> {
  const path = `/houses/${house}/probe-sets`;
  if (round !== undefined) {
    const { source: _, ...change } = body;
    const answer = await send('PATCH', `${path}/${round.id}`, change, `"${round.revision}"`);
    return answer.ok
      ? { ok: true, said: 'The round is amended.' }
      : { ok: false, message: answer.message, fields: answer.fields };
  }
  const id = newId();
  const at = new Date(now).toISOString();
  const label = `Probe round, ${toLocal(now, zone).replace('T', ', ')}`;
  const piece = { id, owner, path, label, writtenAt: Date.now(), refused: null };
  return outcomeOf(
    await writeDown([{ ...piece, body: { ...body, id, at } }]),
    'The round stands in the book.',
  );
}
