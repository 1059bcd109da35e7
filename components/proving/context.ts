'use client';
import { createContext, use } from 'react';
import type { Channel, House } from '@/lib/schema/yard-view';
import type { Preferences } from '@/lib/units/preferences';
import type { ProofActs } from './use-proof';

export interface ProvingData {
  house: House;
  channel: Channel;
  /** It drives air through a heap's pipe. */
  isHeapFan: boolean;
  /** Of its node, s: a reading comes so often. */
  reportEvery: number;
  preferences: Preferences;
  /** Today where the house stands, YYYY-MM-DD. */
  today: string;
}

export const ProvingContext = createContext<(ProvingData & ProofActs) | null>(null);

export function useProving(): ProvingData & ProofActs {
  const proving = use(ProvingContext);
  if (proving === null) throw new Error('useProving stands outside a proof');
  return proving;
}
