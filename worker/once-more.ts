/**
 * Work of which only the last run counts: asked for while it runs, it is run once more afterwards, however often it is
 * asked for meanwhile. A run that fails fails for those who asked for it, and hinders no later one.
 */
export class OnceMore {
  private running: Promise<void> | null = null;
  private waiting: Promise<void> | null = null;

  constructor(private readonly work: () => Promise<void>) {}

  /** Nothing runs, and nothing is about to. */
  get idle(): boolean {
    return this.running === null && this.waiting === null;
  }

  /** @returns the end of a run that began after this call */
  run(): Promise<void> {
    if (this.running === null) return this.start();
    this.waiting ??= this.running
      .catch(() => undefined)
      .then(() => {
        this.waiting = null;
        return this.start();
      });
    return this.waiting;
  }

  private start(): Promise<void> {
    const run = this.work().finally(() => {
      this.running = null;
    });
    this.running = run;
    return run;
  }
}
