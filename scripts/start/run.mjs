// `npm start` from packages to the door; each step is skipped when it is done already.
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import { createInterface } from 'node:readline';
import { ensurePackages } from '../packages.mjs';
import { DOOR, doorArguments, partsEnvironment } from '../parts.mjs';
import { BUILD, ROOT } from '../places.mjs';
import { isFree, nextFree } from '../ports.mjs';
import { CONFIGURATION, say, Trouble } from '../say.mjs';
import { claimFolder, keptSecrets } from './kept.mjs';
import { checkNode, readSettings } from './settings.mjs';

export async function start(env = process.env, usual = {}) {
  checkNode();
  const settings = readSettings(env, usual);
  const port = await publicPort(settings);
  process.chdir(ROOT);
  ensurePackages();

  // what follows stands on packages, so it is imported only now
  const { ensurePostgres, makeFolder, stopPostgres } = await import('../pg.mjs');
  makeFolder(settings.dataDir);
  claimFolder(settings.dataDir, port);
  const secrets = keptSecrets(settings);
  const database = await ensurePostgres({ dataDir: settings.dataDir, databaseUrl: settings.databaseUrl });
  say(database.started ? 'PostgreSQL started' : 'PostgreSQL … already there');
  // the last thing at the end, after all who use it; this folder has no other user, or it could not have been claimed
  if (database.own) process.once('exit', () => stopPostgres({ dataDir: settings.dataDir }));
  await migrate(database);

  const { build, PROGRAMS } = await import('../build.mjs');
  await build(Object.keys(PROGRAMS));
  const webPort = settings.webPort ?? (await nextFree(port + 1, LOOPBACK));
  const workerPort = settings.workerPort ?? (await nextFree(Math.max(port, webPort) + 1, LOOPBACK));
  const mailPort = settings.mailPort ?? (await nextFree(Math.max(port, webPort, workerPort) + 1, LOOPBACK));
  const trainingPort = await nextFree(Math.max(port, webPort, workerPort, mailPort) + 1, LOOPBACK);
  const publicUrl = settings.publicUrl ?? `http://localhost:${port}`;
  const ports = { webPort, workerPort, mailPort, trainingPort };
  const parts = { ...settings, ...ports, ...secrets, databaseUrl: database.url, publicUrl };
  Object.assign(process.env, partsEnvironment(parts));
  await seed(secrets.password, usual.seedArguments ?? []);
  await build();

  say(settings.yard ? 'starting web, worker, yard' : 'starting web, worker');
  delete process.env.DEMO_PASSWORD; // only the seed needs it
  const notes = signIns(secrets.password);
  process.argv = [
    process.argv[0],
    DOOR,
    ...doorArguments({ ...parts, port, publicUrl: settings.publicUrl, notes }),
  ];
  await import(DOOR);
}

const LOOPBACK = ['127.0.0.1'];

async function publicPort({ port, portFixed, host }) {
  const hosts = host === undefined ? undefined : [host];
  if (await isFree(port, hosts)) return port;
  if (portFixed) {
    throw new Trouble(
      `PORT is ${port}, and another program listens there. Set PORT to another number, or leave it out to take the next free one.`,
      CONFIGURATION,
    );
  }
  const free = await nextFree(port + 1, hosts);
  say(`port ${port} is taken, so Middenward takes ${free}`);
  return free;
}

async function migrate(database) {
  const { runMigrations } = await import('../migrate.mjs');
  const count = await runMigrations(database.ownerUrl);
  say(count === 0 ? 'schema … already there' : `schema: ${count} migration${count === 1 ? '' : 's'} applied`);
  if (!database.own) await warnIfAboveRowSecurity(database.url);
}

/** On a server of the user's own we take the role that they gave; a superuser would see through row-level security. */
async function warnIfAboveRowSecurity(url) {
  const { default: pg } = await import('pg');
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    const { rows } = await client.query(
      'select rolsuper or rolbypassrls as above from pg_roles where rolname = current_user',
    );
    if (rows[0]?.above) {
      say(
        'caution: the role in DATABASE_URL is a superuser or bypasses row-level security, the second line behind permissions; give Middenward a plain role',
      );
    }
  } finally {
    await client.end();
  }
}

/** The seed says what it does; where all is there, it says nothing. */
async function seed(password, seedArguments) {
  const child = spawn(
    process.execPath,
    ['--enable-source-maps', path.join(BUILD, 'seed.mjs'), ...seedArguments],
    {
      cwd: ROOT,
      stdio: ['ignore', 'pipe', 'inherit'],
      env: { ...process.env, DEMO_PASSWORD: password },
    },
  );
  let quiet = true;
  for await (const line of createInterface({ input: child.stdout })) {
    quiet = false;
    say(line);
  }
  const code = child.exitCode ?? (await once(child, 'exit'))[0];
  if (code !== 0) throw new Trouble('The demo holdings could not be made; the reason is above.', code ?? 1);
  if (quiet) say('demo holdings … already there');
}

function signIns(password) {
  return [
    `Sign in with the password ${password} as`,
    '  owner@larkmoor.example      owner of Larkmoor Growers',
    '  grower@larkmoor.example     grower there',
    '  installer@larkmoor.example  installer there',
    '  owner@stonebeck.example     owner of Stonebeck Nursery',
    'Ctrl-C stops everything.',
  ];
}
