/** Timers by name: to set one again calls off the one before. */
export class Timers<Name extends string> {
  private readonly cancels = new Map<Name, () => void>();

  constructor(private readonly after: (ms: number, then: () => void) => () => void) {}

  set(name: Name, ms: number, then: () => void): void {
    this.cancel(name);
    this.cancels.set(name, this.after(Math.max(0, ms), then));
  }

  cancel(name: Name): void {
    this.cancels.get(name)?.();
    this.cancels.delete(name);
  }

  cancelAll(): void {
    for (const cancel of this.cancels.values()) cancel();
    this.cancels.clear();
  }
}
