import type { HeapCost } from '@/lib/schema/money';

export const COST_WORDS: Record<HeapCost['kind'], string> = {
  materials: 'Materials',
  haulage: 'Haulage',
  work: 'Hours of work',
  pipe: 'Pipe',
  fan: 'Fan',
  other: 'Other',
};
