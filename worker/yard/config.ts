/** What the yard is told at its start: by arguments and one file, and by nothing else. */
import { parseArgs } from 'node:util';
import { readFileSync } from 'node:fs';
import { z } from 'zod';
import { yardHouses } from './catalogue';

const houseKeys = yardHouses.map(({ key }) => key);

const yardConfig = z.strictObject({
  seed: z.number().int(),
  /** where the world is kept over a restart */
  stateFile: z.string().min(1),
  nodes: z.array(
    z.strictObject({
      key: z.string().min(1),
      token: z.string().min(1),
      /** key of the house in the yard's catalogue that this node is wired into */
      house: z.string().refine((key) => houseKeys.includes(key), {
        error: ({ input }) => `the yard has no house "${String(input)}"; it has ${houseKeys.join(', ')}`,
      }),
    }),
  ),
});

export type YardConfig = z.infer<typeof yardConfig> & {
  server: string;
  rate: number;
  trainingPort: number | null;
};

/** @throws Error with a sentence that says what to give, for arguments or a file that do not fit */
export function readConfig(argv: readonly string[]): YardConfig {
  const { values } = parseArgs({
    args: [...argv],
    options: {
      config: { type: 'string' },
      server: { type: 'string' },
      rate: { type: 'string', default: '1' },
      training: { type: 'string' },
    },
  });
  if (values.config === undefined || values.server === undefined) {
    throw new Error('give --config FILE --server WS_URL [--rate N] [--training PORT]');
  }
  const rate = Number(values.rate);
  if (!Number.isFinite(rate) || rate <= 0)
    throw new Error(`--rate must be a number above 0, not "${values.rate}"`);
  if (!/^wss?:\/\//.test(values.server)) {
    throw new Error(`--server must begin with ws:// or wss://, not "${values.server}"`);
  }
  const trainingPort = values.training === undefined ? null : Number(values.training);
  if (
    trainingPort !== null &&
    !(Number.isInteger(trainingPort) && trainingPort > 0 && trainingPort < 65_536)
  ) {
    throw new Error(`--training must be a port, not "${values.training}"`);
  }
  let body: unknown;
  try {
    body = JSON.parse(readFileSync(values.config, 'utf8'));
  } catch (error) {
    throw new Error(`the file of --config cannot be read as JSON: ${values.config}`, { cause: error });
  }
  const parsed = yardConfig.safeParse(body);
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    throw new Error(
      `the file of --config is wrong at ${issue?.path.join('.') ?? ''}: ${issue?.message ?? ''}`,
    );
  }
  return { ...parsed.data, server: values.server, rate, trainingPort };
}
