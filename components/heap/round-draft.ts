/** A probe round while it is entered: the text of each place, and which place is next. */
import type { Section } from '@/lib/analysis/probe-section';
import { ProbeSetCreate, Section as SectionShape, type ProbeSet } from '@/lib/schema/probe-set';
import { celsius } from '@/lib/units/conversion';
import { temperatureFigure } from '@/lib/units/format';
import type { Preferences } from '@/lib/units/preferences';
import { numberTyped } from '@/lib/units/typed';

export interface RoundDraft {
  section: SectionDraft;
  /** By `keyOf` a place, in the reader's degrees; what was left out is not in it. */
  typed: Record<string, string>;
  place: Place;
  text: string;
}
export interface Place {
  column: number;
  row: number;
}
/** As typed. */
export type SectionDraft = Record<keyof Section, string>;

export const keyOf = ({ column, row }: Place) => `${column} ${row}`;

export const FIRST_SECTION: Section = {
  ...{ widthM: 3, heightM: 1.2, sunkM: 0.5, columns: 4, rows: 3, left: 'N', right: 'S' },
};

export function sectionDraft(section: Section): SectionDraft {
  const { widthM, heightM, sunkM, columns, rows, left, right } = section;
  return {
    ...{ widthM: String(widthM), heightM: String(heightM), sunkM: String(sunkM) },
    ...{ columns: String(columns), rows: String(rows), left, right },
  };
}

/** What the form begins with: a round that is amended as it stands, else the places of the last one, without figures. */
export function roundDraft({
  section,
  round,
  preferences,
}: {
  section: Section | null;
  round?: ProbeSet;
  preferences: Preferences;
}): RoundDraft {
  const typed = (round?.places ?? []).map((place): [string, string] => [
    keyOf(place),
    temperatureFigure(place.celsius, preferences),
  ]);
  return {
    section: sectionDraft(round?.section ?? section ?? FIRST_SECTION),
    ...{ typed: Object.fromEntries(typed), place: { column: 0, row: 0 }, text: round?.text ?? '' },
  };
}

/** The grid that is shown while the section is typed; what cannot be read yet leaves it as small as it may be. */
export function gridOf(draft: SectionDraft): { columns: number; rows: number } {
  const whole = (text: string, most: number) =>
    Math.min(most, Math.max(1, Math.floor(numberTyped(text) ?? 1)));
  return { columns: whole(draft.columns, 8), rows: whole(draft.rows, 6) };
}

/** The probe goes down at one column, place by place, then on to the next; after the last place none is next. */
export function nextPlace({ column, row }: Place, grid: { columns: number; rows: number }): Place | null {
  if (row + 1 < grid.rows) return { column, row: row + 1 };
  return column + 1 < grid.columns ? { column: column + 1, row: 0 } : null;
}

/** A figure with its decimal is whole, so the next place comes by itself; 45 might go on to be 45.4. */
export const isWhole = (text: string) => /^[-−]?\d+[.,]\d$/.test(text);

/** One key pressed; figures that no probe reads are not taken. */
export function pressed(text: string, key: string): string {
  if (key === '⌫') return text.slice(0, -1);
  if (key === '−') return text.startsWith('−') ? text.slice(1) : `−${text}`;
  if (key === '.') return /[.,]/.test(text) ? text : `${text === '' || text === '−' ? `${text}0` : text}.`;
  return isWhole(text) || text.replace(/\D/g, '').length >= 4 ? text : text + key;
}

export type JudgedRound =
  | { ok: true; body: Record<string, unknown> }
  | { ok: false; message: string; fields: Record<string, string>; places: string[] };

export function judgeRound(draft: RoundDraft, heap: string, preferences: Preferences): JudgedRound {
  const fields: Record<string, string> = {};
  const { left, right, ...numbers } = draft.section;
  const read = Object.fromEntries(
    Object.entries(numbers).map(([name, text]) => {
      const value = numberTyped(text);
      if (value === null) fields[name] = 'Give a number.';
      return [name, value];
    }),
  );
  const section = SectionShape.safeParse({ ...read, left, right });
  for (const issue of section.error?.issues ?? []) fields[issue.path.join('.')] ??= issue.message;
  const wrong: string[] = [];
  const grid = gridOf(draft.section);
  const places = Object.entries(draft.typed).flatMap(([key, text]) => {
    const [column = 0, row = 0] = key.split(' ').map(Number);
    if (text.trim() === '' || column >= grid.columns || row >= grid.rows) return [];
    const value = numberTyped(text);
    if (value === null) {
      wrong.push(key);
      return [];
    }
    const exact = preferences.temperature === 'F' ? celsius(value) : value;
    return [{ column, row, celsius: Math.round(exact * 1000) / 1000 }];
  });
  const body = ProbeSetCreate.safeParse({ source: heap, section: section.data, places, text: draft.text });
  for (const issue of body.error?.issues ?? []) {
    const [head, index] = issue.path;
    const place = head === 'places' && typeof index === 'number' ? places[index] : undefined;
    if (place === undefined) fields[issue.path.join('.')] ??= issue.message;
    else wrong.push(keyOf(place));
  }
  if (!section.success || !body.success || wrong.length > 0)
    return {
      ok: false,
      message:
        wrong.length > 0
          ? 'One place holds no temperature that can be; it is marked.'
          : (fields['places'] ?? 'Not right yet: see what is marked.'),
      ...{ fields, places: wrong },
    };
  return { ok: true, body: body.data };
}
