/** The world and the nodes' flash on disk, between one start of the yard and the next. */
import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { z } from 'zod';
import { fallbackSetting } from '@/lib/field/frames';
import { yardHouses } from './catalogue';
import { flowNames } from './house-world';
import type { KeptNode } from './node-parts';
import type { World } from './world';

const finite = z.number();
const worldFile = z.strictObject({
  version: z.literal(1),
  seed: z.number().int(),
  ms: finite,
  houses: z.record(
    z.string(),
    z.strictObject({
      airC: finite,
      massC: finite,
      heap: z.strictObject({
        coreC: finite,
        baseC: finite,
        digestibleJ: finite,
        shellJ: finite,
        massKg: finite,
        moisture: finite,
      }),
      ringC: finite,
      heapReturnC: finite,
      soilReturnC: finite,
      flowsJ: z.record(z.enum(flowNames), finite),
    }),
  ),
  relays: z.record(z.string(), z.record(z.string(), z.enum(['on', 'off']))),
});

/** The world of a file, or why there is none to go on from. Another seed is another winter: it begins anew. */
export function readWorld(file: string, seed: number): { world: World } | { why: string } {
  let text: string;
  try {
    text = readFileSync(file, 'utf8');
  } catch {
    return { why: 'there is no saved world yet' };
  }
  try {
    const parsed = worldFile.safeParse(JSON.parse(text));
    if (!parsed.success) return { why: 'the saved world is of another form' };
    if (parsed.data.seed !== seed) return { why: 'the saved world is of another seed' };
    const missing = yardHouses.find(({ key }) => parsed.data.houses[key] === undefined);
    return missing === undefined ? { world: parsed.data } : { why: `the saved world has no ${missing.key}` };
  } catch {
    return { why: 'the saved world is not whole' };
  }
}

export function saveWorld(file: string, world: World): void {
  write(file, world);
}

const keptNode = z.strictObject({
  fallback: z
    .strictObject({ settings: z.record(z.string(), fallbackSetting), spent: z.array(z.string()) })
    .nullable(),
  logs: z.array(z.strictObject({ level: z.enum(['info', 'warning']), text: z.string() })),
});

/**
 * A node's flash, in a file beside the world's. What cannot be read is as a new node's: it has no fallback until the
 * next command brings one.
 */
export function nodeFlash(
  stateFile: string,
  node: string,
  failed: (why: string) => void,
): { read(): KeptNode; write(kept: KeptNode): void } {
  const file = `${stateFile}.${encodeURIComponent(node)}`;
  return {
    read: () => {
      try {
        return keptNode.parse(JSON.parse(readFileSync(file, 'utf8')));
      } catch {
        return { fallback: null, logs: [] };
      }
    },
    write: (kept) => {
      try {
        write(file, kept);
      } catch (error) {
        failed(error instanceof Error ? error.message : String(error));
      }
    },
  };
}

/** Written beside and moved into place, so that a kill in the middle leaves the former one. */
function write(file: string, content: object): void {
  mkdirSync(dirname(file), { recursive: true });
  const beside = `${file}.new`;
  writeFileSync(beside, JSON.stringify(content));
  renameSync(beside, file);
}
