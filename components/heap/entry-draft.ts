/** What stands in the form while it is typed, and the body that is made of it: the route's own schema judges it. */
import { HeapEntryCreate } from '@/lib/schema/heap';
import type { HeapEntry } from '@/lib/schema/heap-view';
import { fromLocal, toLocal } from '@/lib/units/local-time';
import { numberTyped } from '@/lib/units/typed';

export interface MaterialDraft {
  /** Keeps rows apart while they are added and taken away. */
  id: number;
  material: string;
  amount: string;
  unit: 'kg' | 'L';
}

export interface EntryDraft {
  at: string;
  /** As the entry had it: a field has no seconds, and an hour that comes twice would else be changed by opening it. */
  opened: { local: string; at: number } | null;
  text: string;
  materials: MaterialDraft[];
  water: string;
  volume: string;
  smell: HeapEntry['smell'];
  squeeze: HeapEntry['squeeze'];
}

export type Judged =
  | { ok: true; body: Record<string, unknown> }
  /** By dotted path of the body. */
  | { ok: false; fields: Record<string, string> };

export const emptyMaterial = (id: number): MaterialDraft => ({ id, material: '', amount: '', unit: 'kg' });

export function draftOf(entry: HeapEntry | undefined, now: number, zone: string): EntryDraft {
  if (entry === undefined)
    return {
      at: toLocal(now, zone),
      opened: null,
      text: '',
      materials: [emptyMaterial(0)],
      water: '',
      volume: '',
      ...{ smell: null, squeeze: null },
    };
  const materials = entry.materials.map(({ material, kilograms, litres }, id): MaterialDraft => {
    const unit = kilograms === undefined ? 'L' : 'kg';
    return { id, material, amount: String(kilograms ?? litres ?? ''), unit };
  });
  return {
    at: toLocal(Date.parse(entry.at), zone),
    opened: { local: toLocal(Date.parse(entry.at), zone), at: Date.parse(entry.at) },
    text: entry.text,
    materials: [...materials, emptyMaterial(materials.length)],
    water: entry.litresOfWater === null ? '' : String(entry.litresOfWater),
    volume: entry.volume === null ? '' : String(entry.volume),
    ...{ smell: entry.smell, squeeze: entry.squeeze },
  };
}

const NOT_A_NUMBER = 'Give a number, such as 120 or 7.5.';

/** Rows that were left empty are no rows. An amount that cannot be read is told at its field, and nothing is sent. */
export function judge(
  draft: EntryDraft,
  target: { heap: string; kind: HeapEntry['kind']; zone: string; isAmended: boolean },
  now: number,
): Judged {
  const fields: Record<string, string> = {};
  const number = (text: string, path: string) => {
    if (text.trim() === '') return null;
    const value = numberTyped(text);
    if (value === null) fields[path] = NOT_A_NUMBER;
    return value;
  };
  const { opened } = draft;
  const at = opened?.local === draft.at ? opened.at : fromLocal(draft.at, target.zone);
  if (at === null) fields['at'] = 'Give date and time.';
  // a minute of grace: the field has no seconds
  else if (at > now + 60_000) fields['at'] = 'That is still to come: the book tells what was done.';
  const materials = filled(draft).map(({ material, amount, unit }, place) => {
    const value = number(amount, `materials.${place}.${unit === 'kg' ? 'kilograms' : 'litres'}`);
    return { material, ...(value === null ? {} : unit === 'kg' ? { kilograms: value } : { litres: value }) };
  });
  const litresOfWater = number(draft.water, 'litresOfWater');
  const volume = number(draft.volume, 'volume');
  const parsed = HeapEntryCreate.safeParse({
    source: target.heap,
    kind: target.kind,
    ...(at === null ? {} : { at: new Date(at).toISOString() }),
    text: draft.text,
    materials,
    ...(litresOfWater === null ? {} : { litresOfWater }),
    ...(volume === null ? {} : { volume }),
    ...(draft.smell === null ? {} : { smell: draft.smell }),
    ...(draft.squeeze === null ? {} : { squeeze: draft.squeeze }),
  });
  for (const issue of parsed.error?.issues ?? []) fields[issue.path.join('.')] ??= issue.message;
  if (!parsed.success || Object.keys(fields).length > 0) return { ok: false, fields };
  const { source, ...rest } = parsed.data;
  const { smell, squeeze } = draft;
  // what was taken out is sent as null, or it would stay
  const cleared = { litresOfWater, volume, smell, squeeze };
  return { ok: true, body: target.isAmended ? { ...rest, ...cleared } : { source, ...rest } };
}

export function filled(draft: EntryDraft): MaterialDraft[] {
  return draft.materials.filter((row) => row.material.trim() !== '' || row.amount.trim() !== '');
}
