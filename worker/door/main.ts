// The door: starts the other processes and keeps them running, and owns the public port. It knows nothing of what it
// carries: its settings are its arguments, and which worker leads it learns from their health.
import { systemClock } from './clock';
import { createFront } from './front';
import { askHealth, LeaderWatch } from './leader';
import { openPort, PortTaken } from './listen';
import { LogFile } from './log-file';
import { askThroughDoor, waitUntilReady } from './ready';
import { readSettings, SettingsFault, type Settings } from './settings';
import { staticFiles } from './static-files';
import { CONFIGURATION, Supervisor } from './supervise';

const say = (line: string) => console.log(line);
// whoever read our lines may go (a closed terminal, `| head`); control goes on
process.stdout.on('error', () => {});

function endWith(sentence: string, code: number): never {
  console.error(sentence);
  process.exit(code);
}

async function run(settings: Settings): Promise<void> {
  const clock = systemClock;
  const leader = new LeaderWatch(settings.workerPorts, clock, askHealth, (port) => front.cutAllBut(port));
  const front = createFront({
    webPort: settings.webPort,
    leaderPort: () => leader.port,
    trustProxy: settings.trustProxy,
    files:
      settings.static === null
        ? null
        : staticFiles(settings.static, settings.publicUrl?.startsWith('https://') === true),
  });
  const { port, servers } = await openPort(front, settings.host, settings.port, settings.portFixed);
  if (port !== settings.port) say(`Port ${settings.port} is taken, so Middenward takes ${port}.`);

  let ready = false;
  let stopping = false;
  const parts = settings.children.map(({ name, command }) => {
    const part: Supervisor = new Supervisor({
      name,
      command: command.map((word) => word.replaceAll('{port}', String(port))),
      clock,
      log: settings.logs === null ? null : new LogFile(settings.logs, name),
      say,
      onEnd: (code, lastLine) => {
        if (code === CONFIGURATION && !ready) void stop(CONFIGURATION, `${name} cannot start: ${lastLine}`);
      },
    });
    return part;
  });

  async function stop(code: number, sentence?: string): Promise<void> {
    if (stopping) {
      await Promise.all(parts.map((part) => part.stop(0))); // asked twice: no more patience
      process.exit(code);
    }
    stopping = true;
    if (sentence !== undefined) console.error(sentence);
    leader.stop();
    for (const server of servers) server.close();
    await Promise.all(parts.map((part) => part.stop()));
    front.close();
    for (const server of servers) server.closeAllConnections();
    process.exit(code);
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.on(signal, () => {
      if (!stopping) say('Stopping …');
      void stop(0);
    });
  }

  leader.start();
  for (const part of parts) part.start();
  const host = settings.host ?? '127.0.0.1';
  ready = await waitUntilReady(
    () => askThroughDoor(host, port),
    clock,
    say,
    () => stopping,
  );
  if (!ready) return;
  say(`Middenward is ready at ${settings.publicUrl ?? `http://localhost:${port}`}`);
  for (const note of settings.notes) say(note);
}

// Nobody starts the door again, and without it no node reaches its worker: a fault of one request must not end it.
process.on('uncaughtException', (error) => {
  say(`The door met a fault and goes on: ${error.stack ?? error.message}`);
});

try {
  const settings = readSettings(process.argv.slice(2));
  run(settings).catch((error: unknown) => {
    if (error instanceof PortTaken) {
      endWith(
        `PORT is ${settings.port}, and another program listens there. Set PORT to another number, or leave it out to take the next free one.`,
        CONFIGURATION,
      );
    }
    endWith(error instanceof Error ? error.message : String(error), 1);
  });
} catch (error) {
  if (error instanceof SettingsFault) endWith(error.message, 64);
  throw error;
}
