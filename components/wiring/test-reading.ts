/** Asks for one reading of a board, and waits for what comes of it. */
import { send } from '@/components/ui/send';
import type { TestRead } from '@/lib/schema/bus';

/** What was read; or in words why nothing could be asked. */
export type TestReading = TestRead | string;

const LOOK_EVERY_MS = 400;
/** The worker has ten seconds; after that the answer itself says that none came. */
const LOOKS = 35;

/** @param row without its point: nothing is stored */
export async function readNow(house: string, node: string, row: object): Promise<TestReading> {
  const asked = await send<TestRead>('POST', `/houses/${house}/test-reads`, { node, ...row });
  if (!asked.ok) return Object.values(asked.fields)[0] ?? asked.message;
  let read = asked.value;
  for (let looked = 0; read.state === 'asked' && looked < LOOKS; looked += 1) {
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
    const answer = await fetch(`/api/v1/houses/${house}/test-reads/${read.id}`).catch(() => null);
    if (answer?.ok === true) read = (await answer.json()) as TestRead; // our own interface, of the same release
  }
  return read;
}
