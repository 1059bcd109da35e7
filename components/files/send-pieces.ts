import { LARGEST_PIECE } from '@/lib/schema/import';

/**
 * Sends a file from `from` on, one piece after another.
 * @returns null once all is sent, else in words why not
 */
export async function sendPieces(
  path: string,
  file: Blob,
  from: number,
  signal: AbortSignal,
  onPart: (part: number) => void,
): Promise<string | null> {
  for (let at = from; at < file.size; at += LARGEST_PIECE) {
    const body = file.slice(at, at + LARGEST_PIECE);
    try {
      const answer = await fetch(`/api/v1${path}/piece?from=${at}`, {
        ...{ method: 'PUT', body, signal },
        headers: { 'content-type': 'application/octet-stream' },
      });
      if (!answer.ok) return `Sending broke off (${answer.status}). Choose the same file again to go on.`;
    } catch {
      return 'The server does not answer. Choose the same file again to go on.';
    }
    onPart(Math.min(1, (at + LARGEST_PIECE) / file.size));
  }
  return null;
}
