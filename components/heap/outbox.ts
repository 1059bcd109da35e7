/**
 * What was written at the heap and is still to be sent. It stands in the browser's own database before anything is sent, so
 * that neither a dead line nor a dead battery loses it; each piece has an id of its own, and the server takes an id once.
 * A piece belongs to whoever wrote it, and is neither shown to nor sent as anybody else.
 */
import { v7 as uuid } from 'uuid';

export interface Piece {
  id: string;
  /** Holding and person that wrote it. */
  owner: string;
  /** Under /api/v1. */
  path: string;
  /** A body for JSON, or a picture. */
  body: Record<string, unknown> | Blob;
  /** In words, for the list of what waits: "Fed, 26 Nov, 14:20". */
  label: string;
  /** Epoch ms by the phone's clock. */
  writtenAt: number;
  /** Why the server did not take it; such a piece is not sent again by itself. */
  refused: string | null;
}

export const newId = (): string => uuid();

/** @example ownerOf({ holding: 'id', email: 'a@b.example' }) */
export const ownerOf = (who: { holding: string; email: string }) => `${who.holding} ${who.email}`;

const NAME = 'middenward-heap-book';
const STORE = 'pieces';

function opened(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const asked = indexedDB.open(NAME, 1);
    asked.onupgradeneeded = () => asked.result.createObjectStore(STORE, { keyPath: 'id' });
    asked.onsuccess = () => resolve(asked.result);
    asked.onerror = () => reject(asked.error ?? new Error('the browser keeps nothing here'));
  });
}

async function within<T>(
  mode: IDBTransactionMode,
  work: (store: IDBObjectStore) => IDBRequest<T>,
): Promise<T> {
  const database = await opened();
  try {
    return await new Promise<T>((resolve, reject) => {
      const transaction = database.transaction(STORE, mode);
      const asked = work(transaction.objectStore(STORE));
      // done when it is on disk, not when it is asked for
      transaction.oncomplete = () => resolve(asked.result);
      transaction.onabort = () => reject(transaction.error ?? new Error('nothing was kept'));
    });
  } finally {
    database.close();
  }
}

export async function keepPiece(piece: Piece): Promise<void> {
  await within('readwrite', (store) => store.put(piece));
  tell();
}

export async function dropPiece(id: string): Promise<void> {
  await within('readwrite', (store) => store.delete(id));
  tell();
}

/** In the order in which they were written: a photograph comes behind its entry. */
export async function piecesOf(owner: string): Promise<Piece[]> {
  const all = await within<Piece[]>('readonly', (store) => store.getAll() as IDBRequest<Piece[]>);
  return all
    .filter((one) => one.owner === owner)
    .sort((a, b) => a.writtenAt - b.writtenAt || (a.id < b.id ? -1 : 1));
}

const CHANGED = 'middenward-outbox';
const tell = () => window.dispatchEvent(new Event(CHANGED));

/** @returns the way to stop listening */
export function onOutboxChange(listener: () => void): () => void {
  window.addEventListener(CHANGED, listener);
  return () => window.removeEventListener(CHANGED, listener);
}
