import 'server-only';
import { inHolding } from '@/db/client';
import { takenCommand } from '@/db/queries/person-command';

const LONGEST_WAIT_MS = 1500;
const LOOK_EVERY_MS = 25;

/**
 * Waits until the core has taken an order, so that a look at the state right after shows it. Without a worker it gives
 * up: the order stands in the database and is taken when one leads again.
 */
export async function untilTaken(holdingId: string, houseId: string, number: number): Promise<void> {
  const end = performance.now() + LONGEST_WAIT_MS;
  while (performance.now() < end) {
    const taken = await inHolding(holdingId, (holding) => takenCommand(holding, houseId));
    if (taken >= number) return;
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
  }
}
