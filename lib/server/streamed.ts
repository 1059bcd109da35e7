import { log } from './log';

/** Parts, of text or bytes, as a body that is made no faster than it is fetched. One that fails is cut off, never ended as if whole. */
export function streamed(parts: AsyncIterable<string | Uint8Array>): ReadableStream<Uint8Array> {
  const iterator = parts[Symbol.asyncIterator]();
  const encoder = new TextEncoder();
  return new ReadableStream({
    async pull(controller) {
      try {
        const next = await iterator.next();
        if (next.done === true) controller.close();
        else controller.enqueue(typeof next.value === 'string' ? encoder.encode(next.value) : next.value);
      } catch (error) {
        log().error({ err: error }, 'a file that was being sent broke off');
        controller.error(error);
      }
    },
    async cancel() {
      await iterator.return?.();
    },
  });
}
