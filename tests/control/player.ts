/** Runs a house through time: what its points show, what people order, and steps whenever the core asked for one. */
import { compile } from '@/lib/control/compile';
import type { ControlEvent } from '@/lib/control/events';
import { emptyMemory, type Memory } from '@/lib/control/memory';
import { migrateMemory } from '@/lib/control/memory-versions';
import type { Plan } from '@/lib/control/plan';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { HouseConfig, Observed, PersonCommand } from '@/lib/control/types';
import { S, START } from './house';

type Order = PersonCommand extends infer C
  ? C extends PersonCommand
    ? Omit<C, 'number' | 'at' | 'by'>
    : never
  : never;

/** Runs a plan by what its points show, stepping whenever something is said and whenever the core asked to wake. */
export class Player {
  plan: Plan;
  memory: Memory;
  now: number;
  result: StepResult;
  events: ControlEvent[] = [];
  observed: Observed = { workerStartedAt: 0, points: {}, relays: {}, commands: [] };
  /** Points repeat their value so that none falls silent, unless left out here. */
  silent = new Set<string>();
  private values = new Map<string, number>();
  private orders = 0;

  constructor(
    config: HouseConfig,
    values: Record<string, number>,
    memory: Memory = emptyMemory(),
    start = START,
  ) {
    this.plan = compile(config);
    this.memory = memory;
    this.now = start;
    this.say(values);
    this.result = this.step();
  }

  /** New readings, known at once. */
  say(values: Record<string, number>): this {
    for (const [key, value] of Object.entries(values)) this.values.set(key, value);
    return this;
  }

  step(): StepResult {
    for (const [key, value] of this.values)
      if (!this.silent.has(key)) this.observed.points[key] = { value, at: this.now };
    this.result = step(this.plan, this.memory, this.observed, this.now);
    this.memory = this.result.memory;
    this.events.push(...this.result.events);
    return this.result;
  }

  /** Time passes: readings every `every` ms, and a step at each instant that the core asked for. */
  until(at: number, every = 30 * S): this {
    while (this.now < at) {
      const wake = this.memory.wakeAt ?? Infinity;
      this.now = Math.min(at, this.now + every, Math.max(wake, this.now + 1));
      this.step();
    }
    return this;
  }

  pass(ms: number, every?: number): this {
    return this.until(this.now + ms, every);
  }

  /** Another plan from this step on. */
  replan(config: HouseConfig): this {
    this.plan = compile(config);
    this.step();
    return this;
  }

  /** New readings a ms later: two of one point at one time would be one reading. */
  at(values: Record<string, number>): this {
    this.now += 1;
    this.say(values).step();
    return this;
  }

  order(order: Order): this {
    this.orders += 1;
    // the order's own fields with its number, time and person: together a whole command again
    const command = { ...order, number: this.orders, at: this.now, by: 'Ann' };
    this.observed.commands = [...this.observed.commands, command];
    this.step();
    return this;
  }

  /** The worker's memory written out and read back. */
  restart(): this {
    this.memory = migrateMemory(JSON.parse(JSON.stringify(this.memory)));
    return this;
  }

  of(key = 'fan') {
    const found = this.result.channels.find((one) => one.id === key);
    if (found === undefined) throw new Error(`No channel ${key}.`);
    return found;
  }

  /** State and claim in two words: `on band`. */
  says(key = 'fan'): string {
    const { state, claim } = this.of(key);
    return `${state} ${claim}`;
  }

  heap(slug = 'heap') {
    const found = this.result.sources.find((one) => one.id === slug);
    if (found === undefined) throw new Error(`No source ${slug}.`);
    return found;
  }

  faults(): string[] {
    return this.result.faults.map((one) => one.kind);
  }

  /** Switchings of a channel as [seconds since the start, state, claim]. */
  switchings(key = 'fan', start = START): [number, string, string][] {
    return this.events.flatMap((event) =>
      event.kind === 'switching' && event.channel === key
        ? [[(event.at - start) / 1000, event.to, event.claim] as [number, string, string]]
        : [],
    );
  }
}
