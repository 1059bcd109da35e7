/** Saves what stands in the form of an entry: a new one by way of the outbox, an amended one at once. */
import { send } from '@/components/ui/send';
import { kindWord } from '@/lib/wording/heap';
import { judge, type EntryDraft } from './entry-draft';
import type { EntryTarget } from './entry-target';
import { newId, type Piece } from './outbox';
import { photoError } from './photo-field';
import { KEPT, LOST, writeDown } from './write-down';

export type Saved =
  { ok: true; said: string } | { ok: false; message: string; fields: Record<string, string> };

export async function saveEntry(
  target: EntryTarget,
  draft: EntryDraft,
  files: readonly File[],
  now: number,
): Promise<Saved> {
  const { house, heap, kind, zone, entry, owner } = target;
  const judged = judge(draft, { heap, kind, zone, isAmended: entry !== undefined }, now);
  const photographs = photoError(files);
  const fields = {
    ...(judged.ok ? {} : judged.fields),
    ...(photographs === undefined ? {} : { photographs }),
  };
  if (!judged.ok || photographs !== undefined)
    return { ok: false, message: 'Not right yet: see what is marked.', fields };
  const path = `/houses/${house}/heap-entries`;
  const label = `${kindWord(kind)}, ${draft.at.replace('T', ', ')}`;
  const writtenAt = Date.now();
  const piece = (id: string, to: string, body: Piece['body'], name: string): Piece => ({
    ...{ id, owner, path: to, body, label: name, writtenAt, refused: null },
  });
  const entryId = entry?.id ?? newId();
  const pictures = files.map((file) => {
    const id = newId();
    return piece(id, `${path}/${entryId}/photographs?id=${id}`, file, `Photograph: ${label}`);
  });
  if (entry !== undefined) {
    const answer = await send('PATCH', `${path}/${entry.id}`, judged.body, `"${entry.revision}"`);
    if (!answer.ok) return { ok: false, message: answer.message, fields: answer.fields };
    return outcomeOf(await writeDown(pictures), 'The entry is amended.');
  }
  const first = piece(entryId, path, { ...judged.body, id: entryId }, label);
  return outcomeOf(await writeDown([first, ...pictures]), 'It stands in the book.');
}

export function outcomeOf(outcome: Awaited<ReturnType<typeof writeDown>>, sent: string): Saved {
  switch (outcome.kind) {
    case 'sent':
      return { ok: true, said: sent };
    case 'waiting':
      return { ok: true, said: KEPT };
    case 'lost':
      return { ok: false, message: LOST, fields: {} };
    case 'refused':
      return { ok: false, message: outcome.message, fields: outcome.fields };
  }
}
