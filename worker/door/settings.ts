import { parseArgs } from 'node:util';

/** What the door is told. It reads no environment: what its children need goes through it unread. */
export interface Settings {
  port: number;
  /** With false, the next free port is taken when `port` is not free. */
  portFixed: boolean;
  /** null: loopback only, both families. */
  host: string | null;
  /** The address that people are told, if it is not http://localhost:port. */
  publicUrl: string | null;
  /** True behind a reverse proxy that sets x-forwarded-for itself. */
  trustProxy: boolean;
  webPort: number;
  /** The first is the worker that the door starts; others are stand-bys that somebody else starts. */
  workerPorts: number[];
  /** Commands with their arguments; `{port}` in them becomes the public port. */
  children: { name: string; command: string[] }[];
  /** Folder of what web's build made for browsers, which the door then sends itself; null leaves it to web. */
  static: string | null;
  /** Folder of the children's logs; null lets them write where the door writes. */
  logs: string | null;
  /** Lines printed once all is ready. */
  notes: string[];
}

export class SettingsFault extends Error {}

const OPTIONS = {
  port: { type: 'string', default: '3000' },
  'port-fixed': { type: 'boolean', default: false },
  host: { type: 'string' },
  'public-url': { type: 'string' },
  'trust-proxy': { type: 'boolean', default: false },
  'web-port': { type: 'string' },
  'worker-port': { type: 'string', multiple: true },
  web: { type: 'string' },
  worker: { type: 'string' },
  yard: { type: 'string' },
  static: { type: 'string' },
  logs: { type: 'string' },
  note: { type: 'string', multiple: true },
} as const;

/** @throws SettingsFault with a sentence that names the argument */
export function readSettings(argv: string[]): Settings {
  const { values } = parse(argv);
  const children = (['web', 'worker', 'yard'] as const).flatMap((name) => {
    const text = values[name];
    return text === undefined ? [] : [{ name, command: commandOf(name, text) }];
  });
  return {
    port: portOf('port', values.port),
    portFixed: values['port-fixed'],
    host: values.host ?? null,
    publicUrl: values['public-url'] ?? null,
    trustProxy: values['trust-proxy'],
    webPort: portOf('web-port', values['web-port']),
    workerPorts: (values['worker-port'] ?? []).map((text) => portOf('worker-port', text)),
    children,
    static: values.static ?? null,
    logs: values.logs ?? null,
    notes: values.note ?? [],
  };
}

function parse(argv: string[]) {
  try {
    return parseArgs({ args: argv, options: OPTIONS, strict: true });
  } catch (error) {
    throw new SettingsFault(error instanceof Error ? error.message : String(error));
  }
}

function portOf(name: string, text: string | undefined): number {
  const port = Number(text);
  if (text !== undefined && Number.isInteger(port) && port > 0 && port < 65_536) return port;
  throw new SettingsFault(`--${name} must be a port from 1 to 65535, not "${text ?? ''}".`);
}

function commandOf(name: string, text: string): string[] {
  const wrong = new SettingsFault(`--${name} must be a JSON list of a command and its arguments.`);
  let parsed: unknown;
  try {
    parsed = JSON.parse(text);
  } catch {
    throw wrong;
  }
  if (!Array.isArray(parsed) || parsed.length === 0 || !parsed.every((part) => typeof part === 'string')) {
    throw wrong;
  }
  return parsed;
}
