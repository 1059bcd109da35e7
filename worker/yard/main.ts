/**
 * The yard as a process: `--config FILE --server WS_URL [--rate N] [--training PORT]`. One JSON line an event on standard
 * output, `at` being app time where that is known; ends with 0 on SIGTERM and SIGINT after saving its world, with 78 on a wrong setting.
 */
import { iso, systemClock } from './clock';
import { readConfig, type YardConfig } from './config';
import { readWorld, saveWorld } from './store';
import { openTrainingDoor } from './training-door';
import { Yard, type YardLog } from './yard';

const saveEveryMs = 60_000;

const log: YardLog = (event, fields) => {
  const line = { at: iso(systemClock.wallMs()), event, ...fields };
  process.stdout.write(`${JSON.stringify(line)}\n`);
};

function config(): YardConfig {
  try {
    return readConfig(process.argv.slice(2));
  } catch (error) {
    process.stderr.write(`yard: ${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(78);
  }
}

function main(): void {
  const settings = config();
  const saved = readWorld(settings.stateFile, settings.seed);
  const yard = new Yard(settings, systemClock, log, 'world' in saved ? saved.world : undefined);
  const save = (): void => {
    const world = yard.current();
    if (world === undefined) return;
    try {
      saveWorld(settings.stateFile, world);
    } catch (error) {
      // A full disk must not stop the nodes: the next start then only begins further back.
      log('world not saved', { why: error instanceof Error ? error.message : String(error) });
    }
  };
  const saveAgain = (): void => {
    systemClock.after(saveEveryMs, () => {
      save();
      saveAgain();
    });
  };
  const end = (signal: string): void => {
    save();
    yard.stop();
    log('end', { signal });
    process.exit(0);
  };
  process.once('SIGTERM', () => end('SIGTERM'));
  process.once('SIGINT', () => end('SIGINT'));
  log('start', {
    seed: settings.seed,
    rate: settings.rate,
    world: 'world' in saved ? `from ${iso(saved.world.ms)}` : saved.why,
  });
  yard.start();
  if (settings.trainingPort !== null) {
    const door = openTrainingDoor(settings.trainingPort, yard);
    // a taken port must not stop the nodes: there is only nothing to practise on then
    door.on('error', (error) => log('no door for training', { why: error.message }));
  }
  saveAgain();
}

main();
