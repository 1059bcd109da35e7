/** The one place that reads the environment. A bad or missing value stops the start with a sentence that names it. */
import { z } from 'zod';

const Port = z.coerce.number().int().min(0).max(65_535);

export interface BusHost {
  host: string;
  /** Null: any. */
  port: number | null;
}

const BUS_HOST = /^(?:\[([0-9a-f:.]+)\]|([a-z0-9][a-z0-9.-]*))(?::(\d{1,5}))?$/;

function busHosts(text: string, context: z.RefinementCtx): BusHost[] {
  return text.split(',').flatMap((part) => {
    const entry = part.trim().toLowerCase();
    if (entry === '') return [];
    const [, six, host = six, port] = BUS_HOST.exec(entry) ?? [];
    if (host === undefined || Number(port ?? 1) < 1 || Number(port ?? 1) > 65_535) {
      context.addIssue({
        code: 'custom',
        message: 'must be a list such as 192.0.2.10:502, broker.example, [2001:db8::1]:8883',
      });
      return [];
    }
    return { host, port: port === undefined ? null : Number(port) };
  });
}

const Env = z.object({
  /** App role: neither owner nor above row security. */
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/, error: 'must be a postgres:// address' }),
  DATA_DIR: z.string().min(1).default('.data'),
  AUTH_SECRET: z.string().min(32, 'must be at least 32 characters; npm start makes one'),
  /** The browser's origin, without a slash at its end. */
  PUBLIC_URL: z.url().default('http://localhost:3000'),
  WEB_PORT: Port.default(3001),
  WORKER_PORT: Port.default(3002),
  /** Outgoing mail; left out, mail goes to the local sink and can be read in the app. */
  SMTP_URL: z.url({ protocol: /^smtps?$/, error: 'must be an smtp:// or smtps:// address' }).optional(),
  MAIL_FROM: z.string().default('Middenward <middenward@localhost>'),
  MAIL_PORT: Port.default(3025),
  CLOCK_RATE: z.coerce.number().min(0.1).max(600).default(1),
  /** Where the simulated yard takes orders of faults for training, on loopback. */
  TRAINING_PORT: Port.optional(),
  /** Which boards and brokers may be connected to: `host` or `host:port`, with commas between them. */
  BUS_HOSTS: z.string().default('').transform(busHosts),
  YARD: z.enum(['on', 'off']).default('on'),
  DEMO_PASSWORD: z.string().min(15, 'must be at least 15 characters').optional(),
  /** Real milliseconds in which sign-ins are counted, and how many are let through. */
  SIGN_IN_LIMIT: z.coerce.number().int().min(1).default(10),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
});
export type Env = z.infer<typeof Env>;

let read: Env | undefined;

/** @throws EnvError naming each variable that is wrong, never its value. */
export function env(): Env {
  read ??= parseEnv(process.env);
  return read;
}

export class EnvError extends Error {
  override readonly name = 'EnvError';
}

export function parseEnv(from: Record<string, string | undefined>): Env {
  const given = Object.fromEntries(Object.entries(from).filter(([, value]) => value !== ''));
  const parsed = Env.safeParse(given);
  if (parsed.success) return parsed.data;
  const said = parsed.error.issues.map((issue) => {
    const name = String(issue.path[0]);
    return given[name] === undefined ? `${name} is missing` : `${name} ${issue.message}`;
  });
  throw new EnvError(`The environment is not right: ${said.join('; ')}.`);
}

/** `next dev`, where pages need looser rules than in service. Next fills this in when it builds. */
export function isDevelopment(): boolean {
  return process.env.NODE_ENV === 'development';
}
