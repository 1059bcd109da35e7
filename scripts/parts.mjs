// How the door and the parts behind it are called: the same for `npm start` and for tests.
import path from 'node:path';
import { BUILD, ROOT, STATIC } from './places.mjs';

export const DOOR = path.join(BUILD, 'door.mjs');

/** Secrets that the yard, a stranger that knows only the wire, must not be given. */
const NOT_FOR_YARD = ['DATABASE_URL', 'AUTH_SECRET', 'SMTP_URL', 'DEMO_PASSWORD'];

/** The door's arguments. `{port}` is filled in by the door once it has its port. */
export function doorArguments({
  port,
  portFixed,
  host,
  publicUrl,
  trustProxy,
  webPort,
  workerPort,
  standbyPorts = [],
  trainingPort,
  yard,
  rate,
  dataDir,
  notes = [],
}) {
  const node = process.execPath;
  const next = path.join(ROOT, 'node_modules', 'next', 'dist', 'bin', 'next');
  // the pages must keep a connection longer than the door keeps it unused, or a request meets a closing one
  const web = [node, next, 'start', '-H', '127.0.0.1', '-p', String(webPort), '--keepAliveTimeout', '61000'];
  const worker = [node, '--enable-source-maps', path.join(BUILD, 'worker.mjs')];
  const address = `ws://${host ?? '127.0.0.1'}:{port}/field/v1`;
  const simulated = [
    ...['env', ...NOT_FOR_YARD.flatMap((name) => ['-u', name])],
    ...[node, '--enable-source-maps', path.join(BUILD, 'yard.mjs')],
    ...['--config', path.join(dataDir, 'yard.json'), '--server', address, '--rate', String(rate)],
    ...(trainingPort === undefined ? [] : ['--training', String(trainingPort)]),
  ];
  return [
    ...['--port', String(port), '--web-port', String(webPort), '--worker-port', String(workerPort)],
    // workers that somebody else starts: the door only asks them whether they lead
    ...standbyPorts.flatMap((standby) => ['--worker-port', String(standby)]),
    ...(portFixed ? ['--port-fixed'] : []),
    ...(host ? ['--host', host] : []),
    ...(publicUrl ? ['--public-url', publicUrl] : []),
    ...(trustProxy ? ['--trust-proxy'] : []),
    ...['--web', JSON.stringify(web), '--worker', JSON.stringify(worker)],
    ...(yard ? ['--yard', JSON.stringify(simulated)] : []),
    ...['--static', STATIC, '--logs', path.join(dataDir, 'logs')],
    ...notes.flatMap((note) => ['--note', note]),
  ];
}

/** What the parts find in their environment; lib/server/env.ts reads it. */
export function partsEnvironment({
  databaseUrl,
  dataDir,
  authSecret,
  publicUrl,
  webPort,
  workerPort,
  mailPort,
  trainingPort,
  rate,
  yard,
}) {
  return {
    DATABASE_URL: databaseUrl,
    DATA_DIR: dataDir,
    AUTH_SECRET: authSecret,
    PUBLIC_URL: publicUrl,
    WEB_PORT: String(webPort),
    WORKER_PORT: String(workerPort),
    MAIL_PORT: String(mailPort),
    CLOCK_RATE: String(rate),
    YARD: yard ? 'on' : 'off',
    ...(yard && trainingPort !== undefined ? { TRAINING_PORT: String(trainingPort) } : {}),
    NODE_ENV: 'production',
    NEXT_TELEMETRY_DISABLED: '1',
  };
}
