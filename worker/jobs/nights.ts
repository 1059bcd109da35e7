import type { Holding } from '@/db/client';
import { refreshNights as refresh } from '@/db/queries/night-making';

/**
 * Keeps the nights of one house: called every few minutes, it makes what is missing and the lasting night. Readers bring
 * the lasting night up by themselves, so how often this runs decides nothing that anybody sees.
 * @param nowMs app time, epoch ms
 * @returns how many nights were made
 */
export function refreshNights(holding: Holding, houseId: string, nowMs: number): Promise<number> {
  return refresh(holding, houseId, nowMs);
}
