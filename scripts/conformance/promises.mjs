// All promises in their order, and how one is told: kept, broken with what was seen, or left out with why.
import { Broken, LeftOut } from './bench.mjs';
import { alone } from './alone.mjs';
import { commands } from './commands.mjs';
import { day } from './day.mjs';
import { greeting } from './greeting.mjs';
import { lease } from './lease.mjs';
import { line } from './line.mjs';
import { readings } from './readings.mjs';
import { restart } from './restart.mjs';

const PROMISES = { greeting, commands, lease, readings, alone, line, restart, day };
export const GROUPS = Object.keys(PROMISES);

/** @returns how many of each outcome */
export async function runPromises(bench, { only, quick }) {
  const count = { kept: 0, broken: 0, leftOut: 0 };
  for (const group of GROUPS.filter((one) => only.includes(one))) {
    console.log(`\n${group}`);
    const shared = {};
    for (const { promise, isSlow, look } of PROMISES[group]) {
      const [outcome, why] =
        isSlow && quick ? ['leftOut', 'takes minutes'] : await outcomeOf(look, bench, shared);
      count[outcome] += 1;
      const word = { kept: 'kept    ', broken: 'BROKEN  ', leftOut: 'left out' }[outcome];
      console.log(`  ${word}  ${promise}${why === undefined ? '' : `: ${why}`}`);
    }
  }
  return count;
}

async function outcomeOf(look, bench, shared) {
  try {
    await look(bench, shared);
    return ['kept'];
  } catch (error) {
    if (error instanceof LeftOut) return ['leftOut', error.message];
    if (error instanceof Broken) return ['broken', error.message];
    throw error;
  }
}
