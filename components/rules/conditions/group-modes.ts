/** How many of a group must hold: what the interface says by `all`, `any` and a `not` round either. */
import type { DraftGroup } from './draft-tree';

export const MODES = {
  all: { words: 'all of these hold', mode: 'all', isNegated: false },
  any: { words: 'at least one of these holds', mode: 'any', isNegated: false },
  none: { words: 'none of these holds', mode: 'any', isNegated: true },
  'not-all': { words: 'not all of these hold', mode: 'all', isNegated: true },
} as const;
export type ModeName = keyof typeof MODES;
export const isModeName = (text: string): text is ModeName => Object.hasOwn(MODES, text);

export function modeName({ mode, isNegated }: Pick<DraftGroup, 'mode' | 'isNegated'>): ModeName {
  return isNegated ? (mode === 'all' ? 'not-all' : 'none') : mode;
}

/** @example "At least one of these holds:" */
export function groupWords(group: Pick<DraftGroup, 'mode' | 'isNegated'>): string {
  const { words } = MODES[modeName(group)];
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}:`;
}
