import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { pause, type Clock } from './clock';
import type { Log } from './log-file';

/** A part that lived this long is taken as sound again: its next death is followed by the shortest pause. */
const SOUND_AFTER_MS = 60_000;
const FIRST_PAUSE_MS = 1_000;
const LONGEST_PAUSE_MS = 30_000;
/** After TERM; then KILL. */
const STOP_LIMIT_MS = 8_000;
/** EX_CONFIG: a setting is wrong, which starting again does not mend. */
export const CONFIGURATION = 78;

export interface SupervisorOptions {
  name: string;
  command: string[];
  clock: Clock;
  log: Log | null;
  say: (line: string) => void;
  /** Told of each end with its exit code (null for a signal) and the last line that the part wrote. */
  onEnd?: (code: number | null, lastLine: string) => void;
}

/** Keeps one child process running until it is told to stop. */
export class Supervisor {
  private child: ChildProcess | null = null;
  private stopping = false;
  private pauseMs = FIRST_PAUSE_MS;
  private startedAtMs = 0;
  private lastLine = '';
  private callOff: () => void = () => {};

  constructor(private readonly options: SupervisorOptions) {}

  get pid(): number | null {
    return this.child?.pid ?? null;
  }

  start(): void {
    const { command, clock } = this.options;
    const [program = '', ...rest] = [...diesWithUs(), ...command];
    this.startedAtMs = clock.monotonicMs();
    const child = spawn(program, rest, { stdio: ['ignore', 'pipe', 'pipe'] });
    this.child = child;
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (chunk: Buffer) => this.keep(chunk));
    }
    child.once('error', (error) => this.ended(null, null, error.message)); // never started: no "close" with a code follows
    child.once('close', (code, signal) => this.ended(code, signal, this.lastLine));
  }

  /** TERM, then KILL; resolves when the child is gone. */
  async stop(limitMs = STOP_LIMIT_MS): Promise<void> {
    this.stopping = true;
    this.callOff();
    const child = this.child;
    if (child === null) return;
    const gone = new Promise<void>((resolve) => {
      child.once('close', () => resolve());
    });
    child.kill('SIGTERM');
    const callOff = this.options.clock.after(limitMs, () => {
      this.options.say(`${this.options.name} does not end; it is killed`);
      child.kill('SIGKILL');
    });
    await Promise.race([gone, pause(this.options.clock, limitMs + 2_000)]);
    callOff();
  }

  private keep(chunk: Buffer): void {
    if (this.options.log === null) process.stdout.write(chunk);
    else this.options.log.write(chunk);
    const lines = chunk.toString('utf8').trimEnd().split('\n');
    this.lastLine = (lines.at(-1) ?? '').slice(0, 300);
  }

  private ended(code: number | null, signal: string | null, lastLine: string): void {
    if (this.child === null) return;
    this.child = null;
    if (this.stopping) return;
    const { name, clock, say, log, onEnd } = this.options;
    if (clock.monotonicMs() - this.startedAtMs > SOUND_AFTER_MS) this.pauseMs = FIRST_PAUSE_MS;
    const how = signal === null ? `exit code ${code ?? 'unknown'}` : signal;
    const where = log === null ? '' : `; its log is ${log.path}`;
    say(`${name} ended (${how}); starting it again in ${this.pauseMs / 1000} s${where}`);
    this.callOff = clock.after(this.pauseMs, () => {
      if (!this.stopping) this.start();
    });
    this.pauseMs = Math.min(this.pauseMs * 2, LONGEST_PAUSE_MS);
    onEnd?.(code, lastLine);
  }
}

let prefix: string[] | undefined;

/**
 * Where util-linux can do it, the children are told to end when the door is killed outright. A worker left over would
 * go on leading, on a port that no new door knows.
 */
function diesWithUs(): string[] {
  const command = ['setpriv', '--pdeathsig', 'TERM'];
  prefix ??= spawnSync('setpriv', ['--pdeathsig', 'TERM', 'true']).status === 0 ? command : [];
  return prefix;
}
