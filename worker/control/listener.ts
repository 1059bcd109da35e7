import type pg from 'pg';
import type { Base } from '../base';

/** Calls `heard` for each notification; connects again by itself, and then calls `missed`, since some may have been lost. */
export class Listener {
  private client: pg.PoolClient | null = null;
  private stopped = false;

  constructor(
    private readonly base: Base,
    private readonly heard: (channel: string, payload: string) => void,
    private readonly missed: () => void,
  ) {}

  async start(): Promise<void> {
    if (this.stopped) return;
    try {
      const client = await this.base.pool.connect();
      this.client = client;
      client.on('notification', ({ channel, payload }) => this.heard(channel, payload ?? ''));
      const lost = (error?: Error) => {
        if (this.client !== client) return;
        this.client = null;
        client.release(error ?? true);
        this.again();
      };
      client.on('error', lost);
      client.on('end', lost);
      await client.query('listen plan; listen command; listen alarm; listen test_read');
      this.missed();
    } catch {
      this.client?.release(true);
      this.client = null;
      this.again();
    }
  }

  stop(): void {
    this.stopped = true;
    this.client?.release(true);
    this.client = null;
  }

  private again(): void {
    if (!this.stopped) this.base.clock.after(1000, () => void this.start());
  }
}
