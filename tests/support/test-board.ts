import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import path from 'node:path';
import { severalFree } from '../../scripts/ports.mjs';

export interface BoardState {
  coils: boolean[];
  holding: number[];
  writes: [number, boolean][];
  feeds: number;
  reads: number;
}
type Set =
  ['coils' | 'discrete', number, boolean] | ['input' | 'holding', number, number] | ['refuses', 0, number[]];

/** The board of board.mjs, which a test can kill and start again; started again it has forgotten everything. */
export class TestBoard {
  private constructor(
    readonly port: number,
    private readonly watchdog: { register: number; withinMs: number } | null,
    private child: ChildProcess,
  ) {}

  static async start(watchdog: { register: number; withinMs: number } | null = null): Promise<TestBoard> {
    const [port = 0] = await severalFree(1);
    return new TestBoard(port, watchdog, await begun(port, watchdog));
  }

  async up(): Promise<void> {
    this.child = await begun(this.port, this.watchdog);
  }

  set(...set: Set[]): void {
    this.child.send({ set });
  }

  async state(): Promise<BoardState> {
    const answer = once(this.child, 'message');
    this.child.send({ get: true });
    const [{ state }] = (await answer) as [{ state: BoardState }];
    return state;
  }

  async kill(): Promise<void> {
    if (this.child.exitCode !== null || this.child.signalCode !== null) return;
    const gone = once(this.child, 'exit');
    this.child.kill('SIGKILL');
    await gone;
  }

  /** Stands still without a word, as a board that hangs. */
  hang(isHanging: boolean): void {
    this.child.kill(isHanging ? 'SIGSTOP' : 'SIGCONT');
  }
}

async function begun(
  port: number,
  watchdog: { register: number; withinMs: number } | null,
): Promise<ChildProcess> {
  const args = watchdog === null ? [] : [String(watchdog.register), String(watchdog.withinMs)];
  const child = fork(path.join(import.meta.dirname, 'board.mjs'), [String(port), ...args]);
  await once(child, 'message');
  return child;
}
