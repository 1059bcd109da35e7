/** Writes pieces down: kept on the device first, then sent. */
import { deliver, type Delivery } from './deliver';
import { dropPiece, keepPiece, type Piece } from './outbox';

/** What became of the first piece, on which the others hang; `lost` where neither line nor device took it. */
export type Outcome = Delivery | { kind: 'lost' };

export async function writeDown(pieces: readonly Piece[]): Promise<Outcome> {
  const [first] = pieces;
  if (first === undefined) return { kind: 'sent' };
  // a browser that keeps nothing, as in a private window, can still send
  const isKept = await keepAll(pieces);
  const outcome = await deliver(first).catch((): Delivery => ({ kind: 'waiting' }));
  if (outcome.kind === 'refused') {
    if (isKept) for (const piece of pieces) await dropPiece(piece.id);
    return outcome;
  }
  if (outcome.kind === 'waiting') return isKept ? outcome : { kind: 'lost' };
  for (const piece of pieces.slice(1)) {
    const next = await deliver(piece).catch((): Delivery => ({ kind: 'waiting' }));
    // one that is refused later stays in the list, with the reason
    if (next.kind === 'refused' && isKept)
      await keepPiece({ ...piece, refused: Object.values(next.fields)[0] ?? next.message });
  }
  return outcome;
}

async function keepAll(pieces: readonly Piece[]): Promise<boolean> {
  try {
    for (const piece of pieces) await keepPiece(piece);
    return true;
  } catch {
    return false;
  }
}

export const LOST =
  'Neither the server nor this browser takes it just now, so nothing was written. What you gave is still here; try again.';
export const KEPT = 'Kept on this device. It is sent by itself, once, when there is a line.';
