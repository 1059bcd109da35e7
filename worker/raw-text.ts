import type { RawData } from 'ws';

/** The text of a WebSocket message, in whichever form the library hands it over. */
export function rawText(data: RawData): string {
  if (Array.isArray(data)) return Buffer.concat(data).toString('utf8');
  return (data instanceof ArrayBuffer ? Buffer.from(data) : data).toString('utf8');
}
