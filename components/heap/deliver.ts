/** Sends what waits, once: the server answers a repeated id with what it has already. */
import { dropPiece, keepPiece, ownerOf, piecesOf, type Piece } from './outbox';

export type Delivery =
  | { kind: 'sent' }
  /** No line, a server that is away, or nobody signed in: it stays and is tried again. */
  | { kind: 'waiting' }
  | { kind: 'refused'; message: string; fields: Record<string, string> };

/** Sends one piece and takes it out of the outbox when it is there. A refused one is left to the caller. */
export async function deliver(piece: Piece): Promise<Delivery> {
  const picture = piece.body instanceof Blob ? piece.body : null;
  let response: Response;
  try {
    response = await fetch(`/api/v1${piece.path}`, {
      method: 'POST',
      headers: { 'content-type': picture?.type ?? 'application/json' },
      body: picture ?? JSON.stringify(piece.body),
    });
  } catch {
    return { kind: 'waiting' };
  }
  if (response.ok) {
    await dropPiece(piece.id);
    return { kind: 'sent' };
  }
  const { status } = response;
  if (status === 401 || status === 408 || status === 429 || status >= 500) return { kind: 'waiting' };
  const problem = (await response.json().catch(() => ({}))) as {
    detail?: string;
    errors?: { path: string; message: string }[];
  };
  const fields = Object.fromEntries((problem.errors ?? []).map((one) => [one.path, one.message]));
  return { kind: 'refused', message: problem.detail ?? 'The server did not take it.', fields };
}

/** Who is signed in just now; null without a line or a session. */
async function whoIsSignedIn(): Promise<string | null> {
  try {
    const response = await fetch('/api/v1/me');
    if (!response.ok) return null;
    const me = (await response.json()) as { email: string | null; holding: { id: string } };
    return me.email === null ? null : ownerOf({ holding: me.holding.id, email: me.email });
  } catch {
    return null;
  }
}

let running: Promise<number> | null = null;

/** Sends all that waits of one owner, if it is they who are signed in. @returns how many went */
export function deliverAll(owner: string): Promise<number> {
  running ??= sendInTurn(owner).finally(() => {
    running = null;
  });
  return running;
}

async function sendInTurn(owner: string): Promise<number> {
  const waiting = (await piecesOf(owner)).filter((one) => one.refused === null);
  if (waiting.length === 0 || (await whoIsSignedIn()) !== owner) return 0;
  let sent = 0;
  for (const piece of waiting) {
    const delivery = await deliver(piece);
    if (delivery.kind === 'waiting') return sent;
    if (delivery.kind === 'sent') sent += 1;
    else await keepPiece({ ...piece, refused: Object.values(delivery.fields)[0] ?? delivery.message });
  }
  return sent;
}
