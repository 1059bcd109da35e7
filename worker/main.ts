/** The worker: takes readings in, steps the core, commands relays, raises alarms, feeds browsers, runs jobs. */
import { closePools, everyHolding, everyPool } from '@/db/client';
import { ClockRateError } from '@/db/queries/clock';
import { env, EnvError, type Env } from '@/lib/server/env';
import { log } from '@/lib/server/log';
import { pauseReal, startClock, type Clock } from './clock';
import { ownInstance } from './control/instance';
import { startMailSink } from './jobs/mail-sink';
import { Metrics } from './metrics';
import { startWatchdog } from './watchdog';
import { startWorker } from './worker';

/** EX_CONFIG: a setting is wrong, which starting again does not mend. */
const CONFIGURATION = 78;
const RETRY_MS = 2000;
const STOP_LIMIT_MS = 7000;

function endWith(sentence: string): never {
  console.error(sentence);
  process.exit(CONFIGURATION);
}

function readEnv(): Env {
  try {
    return env();
  } catch (error) {
    if (error instanceof EnvError) return endWith(error.message);
    throw error;
  }
}

/** The anchor lies in the database, so the worker waits for that. */
async function clockOnceThere(rate: number): Promise<Clock> {
  for (;;) {
    try {
      return await startClock({ rate });
    } catch (error) {
      if (error instanceof ClockRateError) endWith(error.message);
      log().warn({ err: error }, 'the database is not there yet; tried again');
      await pauseReal(RETRY_MS);
    }
  }
}

async function run(): Promise<void> {
  const settings = readEnv();
  const clock = await clockOnceThere(settings.CLOCK_RATE);
  const base = { clock, log: log(), db: everyHolding(), pool: everyPool(), metrics: new Metrics() };
  const stopWatchdog = startWatchdog(clock);
  const worker = await startWorker(base, ownInstance(settings.DATA_DIR), settings.WORKER_PORT);
  const sink = settings.SMTP_URL === undefined ? await startMailSink(base, settings.MAIL_PORT) : null;
  base.log.info({ port: settings.WORKER_PORT, rate: clock.rate }, 'the worker listens');

  let stopping = false;
  const stop = async () => {
    if (stopping) return;
    stopping = true;
    base.log.info('the worker stops; leases decide about the relays');
    // Without its database an end may wait for ever; the supervisor kills at 8 s.
    clock.after(STOP_LIMIT_MS, () => process.exit(1));
    sink?.close();
    await worker.stop();
    await closePools();
    stopWatchdog();
    process.exit(0);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => void stop());
}

process.on('unhandledRejection', (error) => {
  // Something that nobody awaited: worth knowing, not worth the relays.
  log().error({ err: error }, 'an error was not caught');
});

run().catch((error: unknown) => {
  if (error instanceof Error && 'code' in error && error.code === 'EADDRINUSE') {
    endWith(`${error.message}: another program listens there. Set WORKER_PORT and MAIL_PORT to free ports.`);
  }
  console.error(error);
  process.exit(1);
});
