// What the node does by itself while nobody commands it: one small thermostat a relay, as the last command gave it. Coil on
// while its point is under `below`, off over `above`, never longer than `onFor`, then off for `offFor`. A dead point means off.

/** What a one-wire probe says when it has only just got power, or is not there. */
const NOT_READINGS = [85, -127];

export class Fallback {
  #settings;
  /** By relay number: its coil, since when, and until when it rests. */
  #relays = new Map();

  /**
   * We do not know for how long we were down: what ran or rested then rests its whole `offFor` now, so that a node which
   * starts again and again never runs longer than it may.
   * @param kept `{ settings, spent }` from the disk
   * @param keep called with the same when it changes
   */
  constructor(kept, rate, nowMs, keep) {
    Object.assign(this, { rate, keep });
    this.#settings = kept.settings;
    for (const relay of kept.spent) {
      const setting = this.#settings[relay];
      if (setting)
        this.#relays.set(relay, {
          coil: 'off',
          sinceMs: nowMs,
          restsTillMs: nowMs + this.#ms(setting.offFor),
        });
    }
  }

  get points() {
    return [...new Set(Object.values(this.#settings).map(({ point }) => point))];
  }

  /** The fallbacks of a command take the place of all that were kept. */
  take(settings) {
    if (JSON.stringify(settings) === JSON.stringify(this.#settings)) return;
    this.#settings = settings;
    this.#keepNow();
  }

  /**
   * @param values °C by point; one that is missing or no number is dead
   * @returns what changes: `{ relay, coil, why, point, value }`
   */
  look(nowMs, values) {
    const before = this.#relays.size;
    const changes = Object.entries(this.#settings).flatMap(([relay, setting]) => {
      const read = values.get(setting.point);
      const value = Number.isFinite(read) && !NOT_READINGS.includes(read) ? read : null;
      const now = this.#relays.get(relay);
      if (now?.coil === 'on') {
        const why = this.#endsBy(now, setting, value, nowMs);
        return why === null ? [] : [this.#drop(relay, setting, why, value, nowMs)];
      }
      if (now !== undefined && nowMs < now.restsTillMs) return [];
      this.#relays.delete(relay);
      if (value === null || value >= setting.below) return [];
      this.#relays.set(relay, { coil: 'on', sinceMs: nowMs, restsTillMs: nowMs });
      return [{ relay: Number(relay), coil: 'on', why: 'below', point: setting.point, value }];
    });
    // a rest that is over need not be remembered
    if (changes.length > 0 || this.#relays.size !== before) this.#keepNow();
    return changes;
  }

  /** Until when a run may go on at the most, monotonic ms; Infinity while none does. */
  nextEndMs() {
    const runs = [...this.#relays].filter(([relay, { coil }]) => coil === 'on' && this.#settings[relay]);
    return Math.min(...runs.map(([relay, { sinceMs }]) => sinceMs + this.#ms(this.#settings[relay].onFor)));
  }

  /** A command drives again: what ran ends here, and its rest goes on. @returns what dropped */
  end(nowMs) {
    const running = Object.entries(this.#settings).filter(
      ([relay]) => this.#relays.get(relay)?.coil === 'on',
    );
    const changes = running.map(([relay, setting]) => this.#drop(relay, setting, 'command', null, nowMs));
    if (changes.length > 0) this.#keepNow();
    return changes;
  }

  #endsBy(now, setting, value, nowMs) {
    if (value === null) return 'dead-point';
    if (value > setting.above) return 'above';
    return nowMs >= now.sinceMs + this.#ms(setting.onFor) ? 'longest' : null;
  }

  #drop(relay, setting, why, value, nowMs) {
    this.#relays.set(relay, { coil: 'off', sinceMs: nowMs, restsTillMs: nowMs + this.#ms(setting.offFor) });
    return { relay: Number(relay), coil: 'off', why, point: setting.point, value };
  }

  #ms(seconds) {
    return (seconds * 1000) / this.rate;
  }

  #keepNow() {
    this.keep({ settings: this.#settings, spent: [...this.#relays.keys()] });
  }
}

/** A line of the log, in the form that docs/field-node.md gives; `at` is Unix seconds. */
export function fallbackLine(what, at, { relay, why, point, value } = {}) {
  const pairs = Object.entries({ at: Math.round(at * 1000) / 1000, relay, why, point, value });
  const told = pairs
    .filter(([, one]) => one !== undefined && one !== null)
    .map(([name, one]) => `${name}=${one}`);
  return ['fallback', what, ...told].join(' ');
}
