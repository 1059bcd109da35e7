/**
 * Sets up the demo holdings on an empty database and plays their history: `seed [--nights N] [--evening]`.
 * Prints what it does; writes DATA_DIR/yard.json, from which the simulated yard takes its nodes and their tokens.
 */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { closePools } from '@/db/client';
import type { DemoHouse } from '@/db/seed/demo-house';
import { writeHeapYear, writeMaterials } from '@/db/seed/heap-year';
import { longHouse } from '@/db/seed/long-house';
import { propHouse } from '@/db/seed/prop-house';
import {
  markReady,
  passwordIsSeeded,
  removeHalfSeeded,
  seedState,
  setPassword,
  writeHolding,
  type DemoPerson,
} from '@/db/seed/people';
import { beckHouse } from '@/db/seed/stonebeck';
import { renewTokens, writeHouse, type NodeSecret, type SeededHouse } from '@/db/seed/write-house';
import { env } from '@/lib/server/env';
import { ROLES } from '@/lib/server/permissions';
import { startClock } from '../clock';
import { playHistory } from './demo-history';

const [owner, grower, installer] = ROLES;
/** Of the yard's weather and sensors: the demo is the same winter wherever it is set up. */
const YARD_SEED = 20_261_201;

const HOLDINGS: { name: string; slug: string; people: DemoPerson[]; houses: DemoHouse[] }[] = [
  {
    name: 'Larkmoor Growers',
    slug: 'larkmoor-growers',
    people: [
      { email: 'owner@larkmoor.example', name: 'Larkmoor owner', role: owner },
      { email: 'grower@larkmoor.example', name: 'Larkmoor grower', role: grower },
      { email: 'installer@larkmoor.example', name: 'Larkmoor installer', role: installer },
    ],
    houses: [longHouse, propHouse],
  },
  {
    name: 'Stonebeck Nursery',
    slug: 'stonebeck-nursery',
    people: [{ email: 'owner@stonebeck.example', name: 'Stonebeck owner', role: owner }],
    houses: [beckHouse],
  },
];

const { values: options } = parseArgs({
  options: { nights: { type: 'string', default: '35' }, evening: { type: 'boolean', default: false } },
});

function dataFile(name: string): string {
  return path.resolve(env().DATA_DIR, name);
}

function writeYard(nodes: NodeSecret[]): void {
  const yard = { seed: YARD_SEED, stateFile: dataFile('yard-state.json'), nodes };
  writeFileSync(dataFile('yard.json'), `${JSON.stringify(yard, null, 1)}\n`, { mode: 0o600 });
}

async function seedAll(password: string): Promise<void> {
  const clock = await startClock({ rate: env().CLOCK_RATE, evening: options.evening });
  const to = clock.appNow();
  const from = to - Number(options.nights) * 86_400_000;
  const secrets: NodeSecret[] = [];
  const holdings: { holdingId: string; houses: SeededHouse[] }[] = [];
  for (const given of HOLDINGS) {
    const holding = await writeHolding(given.name, given.slug, given.people, password, new Date(from));
    const by = given.people[0]?.email ?? given.slug;
    const houses: SeededHouse[] = [];
    const act = { by, now: new Date(from) };
    await writeMaterials(holding, given.slug, by, act.now);
    for (const house of given.houses) {
      const seeded = await writeHouse(holding, house, by, act.now);
      houses.push(seeded);
      await writeHeapYear(holding, { id: seeded.houseId, of: house.house }, act, to);
    }
    secrets.push(...houses.flatMap((house) => house.secrets));
    holdings.push({ holdingId: holding.id, houses });
  }
  writeYard(secrets);
  await playHistory(holdings, { from, to, seed: YARD_SEED, stateFile: dataFile('yard-state.json') });
  await markReady(password);
}

async function main(): Promise<void> {
  const password = env().DEMO_PASSWORD;
  if (password === undefined) throw new Error('DEMO_PASSWORD is missing: npm start makes one.');
  const state = await seedState();
  if (state === 'half') {
    console.log('The demo holdings were only half set up: they are set up anew.');
    await removeHalfSeeded(
      HOLDINGS.map(({ slug, people }) => ({ slug, emails: people.map(({ email }) => email) })),
    );
  }
  if (state !== 'ready') {
    await seedAll(password);
    console.log(`Demo holdings set up with ${options.nights} nights of history.`);
    return;
  }
  if (!(await passwordIsSeeded(password))) {
    await setPassword(
      HOLDINGS.flatMap(({ people }) => people.map(({ email }) => email)),
      password,
    );
    console.log('The demo sign-ins have the new password.');
  }
  if (!existsSync(dataFile('yard.json')) || !namesTokens(dataFile('yard.json'))) {
    writeYard(await renewTokens(HOLDINGS.map(({ slug }) => slug)));
    console.log('The simulated nodes have new tokens.');
  }
}

function namesTokens(file: string): boolean {
  return /"token":\s*"\S+"/.test(readFileSync(file, 'utf8'));
}

try {
  await main();
} catch (error) {
  console.error(
    `The demo holdings could not be set up: ${error instanceof Error ? error.message : String(error)}`,
  );
  process.exitCode = 1;
} finally {
  await closePools();
}
