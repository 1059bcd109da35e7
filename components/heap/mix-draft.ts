/** What stands in the mix calculator, and what is reckoned of it while it is typed. */
import {
  heapMix,
  findMaterial,
  type HeapMix,
  type OwnMaterial,
  type WentIn,
} from '@/lib/analysis/material-book';
import { adviseAddition } from '@/lib/analysis/mix';
import { numberTyped } from '@/lib/units/typed';
import { adviceWords, GOAL_CN, GOAL_MOISTURE } from '@/lib/wording/heap-mix';
import type { MaterialDraft } from './entry-draft';

export interface MixStart {
  /** What the heap is made of, to begin with. */
  parts: { material: string; kilograms: number }[];
  waterL: number;
  own: (OwnMaterial & { id: string })[];
  mayWrite: boolean;
}

export interface MixDraft {
  rows: MaterialDraft[];
  water: string;
  adding: string;
  cn: string;
  /** Per cent. */
  moisture: string;
}

export function mixDraft({ parts, waterL }: MixStart): MixDraft {
  const rows = parts.map(({ material, kilograms }, id): MaterialDraft => {
    return { id, material, amount: String(Math.round(kilograms * 10) / 10), unit: 'kg' };
  });
  return {
    rows: [...rows, { id: rows.length, material: '', amount: '', unit: 'kg' }],
    water: waterL > 0 ? String(Math.round(waterL)) : '',
    adding: 'straw',
    cn: String(GOAL_CN),
    moisture: String(GOAL_MOISTURE * 100),
  };
}

export interface Reckoned {
  mix: HeapMix;
  /** Sentences about what to add. */
  words: string[];
  errors: Record<string, string>;
}

export function reckon(draft: MixDraft, own: readonly OwnMaterial[]): Reckoned {
  const errors: Record<string, string> = {};
  const number = (text: string, name: string, least: number, most: number): number | null => {
    if (text.trim() === '') return null;
    const value = numberTyped(text);
    if (value === null || value < least || value > most) {
      errors[name] = `Give a number from ${least} to ${most}.`;
      return null;
    }
    return value;
  };
  const materials = draft.rows.flatMap(({ material, amount, unit, id }): WentIn[] => {
    if (material.trim() === '') return [];
    const value = number(amount, `row ${id}`, 0, 1_000_000);
    return [
      { material, ...(value === null ? {} : unit === 'kg' ? { kilograms: value } : { litres: value }) },
    ];
  });
  const waterL = number(draft.water, 'water', 0, 100_000);
  const mix = heapMix([{ materials, litresOfWater: waterL }], own);
  const cn = number(draft.cn, 'cn', 5, 200);
  const moisture = number(draft.moisture, 'moisture', 5, 90);
  const adding = findMaterial(draft.adding, own);
  if (adding === null)
    return { mix, errors, words: ['Choose a material to add whose figures are known, or enter your own.'] };
  if (cn === null || moisture === null) return { mix, errors, words: [] };
  const goals = { cn, moisture: moisture / 100 };
  return {
    mix,
    errors,
    words: adviceWords(mix.mix, goals, adding.name, adviseAddition(mix.mix, goals, adding)),
  };
}
