/**
 * The small thermostat that a node runs by itself while nobody commands it: one a relay that was given one, each with
 * its own rest. Coil on while the node's own point is under `below`, off over `above`; never on for longer than
 * `onFor`, and after every run off for `offFor`. A dead point means off.
 *
 * Keeps no timer and reads no clock: whoever owns it calls `look` at the monotonic times that `nextMs` names, and oftener.
 */
import type { Coil, FallbackSetting } from '@/lib/field/frames';
import type { FallbackCoil, FallbackWhy } from '@/lib/field/fallback-log';

/** What flash holds: the settings of the newest command, and which of them ran or rested when it was written. */
export interface KeptFallback {
  settings: Record<string, FallbackSetting>;
  spent: string[];
}

export type FallbackChange = Omit<FallbackCoil, 'at'>;

/** A sensor is looked at this often, s of app time: a house cools slowly. */
export const lookEveryS = 5;
/** What a one-wire probe says when it is not there, or has only just got power. */
const notReadings: readonly number[] = [-127, 85];

interface Relay {
  coil: Coil;
  sinceMs: number;
  /** off at least until then, on the monotonic clock */
  restsTillMs: number;
}

export class Fallback {
  private settings: Record<string, FallbackSetting>;
  private readonly relays = new Map<string, Relay>();

  /**
   * A node that starts does not know for how long it was down: what ran or rested then rests its whole `offFor` now, so
   * that one which starts again and again never runs longer than it may.
   * @param rate app seconds a real second: spans are in app time, the monotonic clock in real time
   */
  constructor(
    kept: KeptFallback | null,
    private readonly rate: number,
    startMs: number,
    private readonly keep: (kept: KeptFallback) => void,
  ) {
    this.settings = kept?.settings ?? {};
    for (const key of kept?.spent ?? []) {
      const setting = this.settings[key];
      if (setting === undefined) continue;
      this.relays.set(key, { coil: 'off', sinceMs: startMs, restsTillMs: startMs + this.ms(setting.offFor) });
    }
  }

  /** Whether there is anything to run. */
  get isSet(): boolean {
    return Object.keys(this.settings).length > 0;
  }

  /** A command's fallbacks take the place of all that were kept; what it does not name is no longer run. */
  take(settings: Record<string, FallbackSetting>): void {
    if (JSON.stringify(settings) === JSON.stringify(this.settings)) return;
    this.settings = settings;
    this.keepNow();
  }

  /** A command drives again: runs end here, and their rests go on. @returns what dropped with it */
  end(nowMs: number): FallbackChange[] {
    const changes = Object.entries(this.settings).flatMap(([key, setting]) => {
      const relay = this.relays.get(key);
      if (relay?.coil !== 'on') return [];
      this.drop(relay, setting, nowMs);
      return [changed(key, 'off', 'command', setting, null)];
    });
    if (changes.length > 0) this.keepNow();
    return changes;
  }

  /** @param read the node's own point, °C; null where it has no reading */
  look(nowMs: number, read: (point: string) => number | null): FallbackChange[] {
    const before = this.relays.size;
    const changes = Object.entries(this.settings).flatMap(([key, setting]): FallbackChange[] => {
      const told = read(setting.point);
      const value = told === null || !Number.isFinite(told) || notReadings.includes(told) ? null : told;
      const relay = this.relays.get(key);
      if (relay?.coil === 'on') {
        const why = this.endsBy(relay, setting, value, nowMs);
        if (why === null) return [];
        this.drop(relay, setting, nowMs);
        return [changed(key, 'off', why, setting, value)];
      }
      if (relay !== undefined && nowMs < relay.restsTillMs) return [];
      this.relays.delete(key);
      if (value === null || value >= setting.below) return [];
      this.relays.set(key, { coil: 'on', sinceMs: nowMs, restsTillMs: nowMs });
      return [changed(key, 'on', 'below', setting, value)];
    });
    // a rest that is over is no longer to be remembered
    if (changes.length > 0 || this.relays.size !== before) this.keepNow();
    return changes;
  }

  /** When it must be looked at again at the latest, monotonic ms. */
  nextMs(nowMs: number): number {
    const ends = Object.entries(this.settings).flatMap(([key, setting]) => {
      const relay = this.relays.get(key);
      return relay?.coil === 'on' ? [relay.sinceMs + this.ms(setting.onFor)] : [];
    });
    return Math.min(nowMs + this.ms(lookEveryS), ...ends);
  }

  private endsBy(
    relay: Relay,
    setting: FallbackSetting,
    value: number | null,
    nowMs: number,
  ): FallbackWhy | null {
    if (value === null) return 'dead-point';
    if (value > setting.above) return 'above';
    return nowMs >= relay.sinceMs + this.ms(setting.onFor) ? 'longest' : null;
  }

  private drop(relay: Relay, setting: FallbackSetting, nowMs: number): void {
    // a timer that came late was no longer run than allowed on purpose, but the rest is counted from when it really ended
    relay.coil = 'off';
    relay.sinceMs = nowMs;
    relay.restsTillMs = nowMs + this.ms(setting.offFor);
  }

  private ms(seconds: number): number {
    return (seconds * 1000) / this.rate;
  }

  private keepNow(): void {
    this.keep({ settings: this.settings, spent: [...this.relays.keys()] });
  }
}

function changed(
  key: string,
  what: Coil,
  why: FallbackWhy,
  { point }: FallbackSetting,
  value: number | null,
): FallbackChange {
  return { what, relay: Number(key), why, point, value };
}
