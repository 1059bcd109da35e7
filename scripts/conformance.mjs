#!/usr/bin/env node
// npm run conformance -- URL TOKEN [options]: plays the server to a field node, and holds it to each duty of docs/field-node.md.
// It knows the wire and nothing of Middenward, so that it says the same of a stranger's node as of ours.
import { parseArgs } from 'node:util';
import { Bench } from './conformance/bench.mjs';
import { GROUPS, runPromises } from './conformance/promises.mjs';
import { isCommand } from './places.mjs';

const USAGE = `npm run conformance -- URL TOKEN [options]
  URL            where to listen for the node, such as ws://127.0.0.1:3700 or, for a board in the network, ws://0.0.0.0:3700
  TOKEN          what the node must bring as "Authorization: Bearer TOKEN"
  --run COMMAND  starts the node, and starts it again where a promise is about that; without it the node runs already
  --ask          instead of --run: you are asked to cut the node's power and give it again
  --rate N       app seconds a second (10): leases and intervals are N times shorter; 1 is the full length
  --quick        leaves out what takes minutes of real time
  --day N        minutes in which the node lives through 24 h without a line (2): more where its sensors are slow
  --only A,B     these groups only: ${GROUPS.join(', ')}
Nothing that must not start by itself may be wired to the relays of this node.`;

async function main() {
  const settings = readArguments();
  if (typeof settings === 'string') {
    console.error(settings);
    process.exitCode = 64;
    return;
  }
  const bench = new Bench(settings);
  const end = () => bench.close().then(() => process.exit(130));
  process.once('SIGINT', end);
  process.once('SIGTERM', end);
  try {
    await bench.open();
    console.log(`listening for a node on ${settings.url}`);
    const { kept, broken, leftOut } = await runPromises(bench, settings);
    console.log(`${kept} kept, ${broken} broken, ${leftOut} left out`);
    process.exitCode = broken === 0 ? 0 : 1;
  } catch (error) {
    console.error(error.message);
    process.exitCode = 70;
  } finally {
    await bench.close();
  }
}

function readArguments() {
  const options = {
    ...{
      run: { type: 'string' },
      ask: { type: 'boolean', default: false },
      rate: { type: 'string', default: '10' },
      day: { type: 'string', default: '2' },
    },
    ...{ quick: { type: 'boolean', default: false }, only: { type: 'string' } },
  };
  let parsed;
  try {
    parsed = parseArgs({ options, allowPositionals: true });
  } catch (error) {
    return `${error.message}\n\n${USAGE}`;
  }
  const { values, positionals } = parsed;
  const [given, token] = positionals;
  const url = URL.canParse(given ?? '') ? new URL(given) : undefined;
  const only = values.only?.split(',') ?? GROUPS;
  const rate = Number(values.rate);
  const day = Number(values.day);
  const unknown = only.find((one) => !GROUPS.includes(one));
  if (token === undefined || positionals.length > 2) return USAGE;
  if (url?.protocol !== 'ws:' || url.port === '')
    return `URL must be ws:// with a port, not ${given}\n\n${USAGE}`;
  if (!(rate >= 0.1 && rate <= 60)) return `--rate must be from 0.1 to 60, not ${values.rate}`;
  if (!(day >= 1 && day <= 1440)) return `--day must be from 1 to 1440 minutes, not ${values.day}`;
  if (unknown !== undefined) return `--only knows ${GROUPS.join(', ')}, not ${unknown}`;
  return { ...values, url, token, rate, day, only };
}

if (isCommand(import.meta.url)) await main();
