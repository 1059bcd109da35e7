/**
 * Who may write to a board that knows no command numbers: only the worker that leads. One that is cut off from the
 * database drives on, since nobody may be there to follow it, until it sees the board moved by somebody else.
 */
import type { BusDeps } from './bus';

export class BoardFence {
  /** Somebody else drives this board: its coils are left alone. */
  private left = false;

  constructor(
    private readonly deps: Pick<BusDeps, 'isSure' | 'mayDrive' | 'log'>,
    private readonly nodeId: string,
  ) {}

  /** Left to another, or it is not known whether this worker still leads. */
  get isShut(): boolean {
    return this.left || !this.deps.mayDrive();
  }

  /** With the lead renewed nobody else drives. A new line alone says nothing about that. */
  openIfSure(): void {
    if (this.deps.isSure()) this.left = false;
  }

  /** @param isMoved a coil is otherwise than it was ordered from here */
  seen(isMoved: boolean): void {
    if (!isMoved || this.left || this.deps.isSure()) return;
    this.left = true;
    this.deps.log.warn({ node: this.nodeId }, 'somebody else drives this board; it is left to them');
  }

  /**
   * Who is not sure of its lead looks at the coils right before it writes.
   * @param look reads them; whether one was moved
   */
  async mayWrite(look: () => Promise<boolean>): Promise<boolean> {
    if (!this.isShut && !this.deps.isSure()) this.seen(await look());
    return !this.isShut;
  }
}
