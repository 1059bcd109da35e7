/** The world on disk, between one start of the yard and the next. */
import { mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { z } from 'zod';
import { yardHouses } from './catalogue';
import { flowNames } from './house-world';
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

/** Written beside and moved into place, so that a kill in the middle leaves the former one. */
export function saveWorld(file: string, world: World): void {
  mkdirSync(dirname(file), { recursive: true });
  const beside = `${file}.new`;
  writeFileSync(beside, JSON.stringify(world));
  renameSync(beside, file);
}
