/** A house whose points never fall silent, played so that it steps at no instant but those that the core asked for. */
import type { HouseConfig } from '@/lib/control/types';
import { S, START } from './house';
import { Player } from './player';

const WEEK_S = 604_800;
/** More steps than any of these plays needs: a core that asks again and again for the next instant is found out. */
const MOST_STEPS = 100;

export const lasting = (config: HouseConfig): HouseConfig => ({
  ...config,
  points: config.points.map((one) => ({ ...one, staleAfterS: WEEK_S })),
});

export class Sleeper extends Player {
  constructor(config: HouseConfig, values: Record<string, number>) {
    super(lasting(config), values);
  }

  /** Seconds from the start at which the core wants to be awake next; null: at none. */
  get wakesAtS(): number | null {
    return this.result.wakeAt === null ? null : (this.result.wakeAt - START) / S;
  }

  /** To an instant, in seconds from the start, by the core's own wakes alone. */
  sleepTill(atS: number): this {
    const at = START + atS * S;
    for (let steps = 0; this.now < at; steps += 1) {
      if (steps > MOST_STEPS) throw new Error(`Awake again and again at ${(this.now - START) / S} s.`);
      this.now = Math.min(at, this.result.wakeAt ?? at);
      this.step();
    }
    return this;
  }

  /** New readings and orders at an instant, in seconds from the start. */
  hears(atS: number, values: Record<string, number>): this {
    this.sleepTill(atS - 0.001);
    this.now = START + atS * S;
    this.say(values).step();
    return this;
  }

  /** Decisions of a channel, switchings among them, as [seconds from the start, state, claim]. */
  decisions(key = 'fan'): [number, string, string][] {
    return this.events.flatMap((event): [number, string, string][] => {
      if (event.kind !== 'switching' && event.kind !== 'decision') return [];
      if (event.channel !== key) return [];
      const state = event.kind === 'switching' ? event.to : event.state;
      return [[(event.at - START) / S, state, event.claim]];
    });
  }
}
