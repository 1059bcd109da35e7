// overStraight: time of `step` on the demo's Long house over a night ÷ that of the same house written out by hand, which must
// give the same states, claims and wakeAt at every step, or the benchmark fails; reasons are reckoned when somebody looks,
// and nobody looks at them here, nor does the other have any. settledUs: a step that finds everything anew, as after each
// report of a relay, where most steps of the night only take readings. engineOver: time of json-rules-engine's
// `run` of the same thresholds ÷ time of `step`.
import { Engine } from 'json-rules-engine';
import { compile } from '@/lib/control/compile';
import { emptyMemory, type Memory } from '@/lib/control/memory';
import { step } from '@/lib/control/step';
import type { StepResult } from '@/lib/control/step-result';
import type { Observed } from '@/lib/control/types';
import { demoConfig } from './demo-config';
import { straight, straightState, type Answer } from './straight-line';
import { quantile, ratio, round3, timeMs } from './support';

/** Noon to noon on a winter day without a change of the clock; London's clock is UTC then. */
const NOON = Date.UTC(2027, 0, 10, 12);
const HOURS = 24;
const NIGHTS = 10;
const H = 3_600_000;
const EVERY = 30_000;

interface Instant {
  now: number;
  /** Time of the newest pack. */
  at: number;
  values: number[];
  observed: Observed;
}

const plan = compile(demoConfig());

/** Smooth curves that bring up draws, rests, recoveries, frost and short cycles; nothing here is a real night. */
function valuesAt(key: string, hour: number): number {
  const swing = (hours: number, shift = 0) => Math.sin((2 * Math.PI * hour) / hours + shift);
  switch (key) {
    case 'bench-1':
      return 5.6 + 2.4 * swing(3.7) + 0.3 * swing(24);
    case 'bench-2':
      return 4.4 + 1.9 * swing(5.1);
    case 'house-air':
      return 6 + 2.2 * swing(2.9) - 1.2 * swing(24);
    case 'gate-base':
      return 42.5 + 1.5 * swing(1.3);
    case 'gate-core':
      return 54 + swing(12);
    case 'loop-return':
      return 16 + swing(2);
    case 'fan-amps':
      return 0.5;
    case 'light':
      return 100 + 50 * swing(24);
    default:
      return 8 + swing(6);
  }
}

/** The instants of the night: every pack, and every instant at which the core asked to be woken. */
function night(): { instants: Instant[]; ready: Memory } {
  const first = { workerStartedAt: 0, points: {}, relays: {}, commands: [] };
  const ready = step(
    plan,
    emptyMemory(),
    { ...first, commands: [{ kind: 'ready', source: 'gate-heap', number: 1, at: NOON, by: 'bench' }] },
    NOON - EVERY,
  );
  const instants: Instant[] = [];
  let memory = ready.memory;
  let pack = NOON;
  let known: Instant | null = null;
  while (pack < NOON + HOURS * H) {
    const wake = known === null ? Infinity : (memory.wakeAt ?? Infinity);
    const now = Math.min(pack, wake);
    const isPack = now === pack;
    const values: number[] =
      isPack || known === null ? plan.points.map((one) => valuesAt(one.key, (now - NOON) / H)) : known.values;
    const at: number = isPack || known === null ? now : known.at;
    const points = Object.fromEntries(
      plan.points.map((one, index) => [one.id, { value: values[index] ?? 0, at }]),
    );
    known = { now, at, values, observed: { ...first, points } };
    instants.push(known);
    memory = step(plan, memory, known.observed, now).memory;
    if (isPack) pack += EVERY;
  }
  return { instants, ready: ready.memory };
}

function playCore(
  instants: Instant[],
  ready: Memory,
  { look, anew = false }: { look?: (result: StepResult, index: number) => void; anew?: boolean } = {},
): void {
  let memory = ready;
  for (let index = 0; index < instants.length; index += 1) {
    const instant = instants[index];
    if (instant === undefined) return;
    // a copied memory is none that a step left, so nothing that was found before is known to hold
    const result = step(plan, anew ? { ...memory } : memory, instant.observed, instant.now);
    memory = result.memory;
    look?.(result, index);
  }
}

function playStraight(instants: Instant[], look?: (answer: Answer, index: number) => void): void {
  const state = straightState(NOON);
  for (let index = 0; index < instants.length; index += 1) {
    const instant = instants[index];
    if (instant === undefined) return;
    // told apart from `look?.()`, which would not even reckon its argument where nobody looks
    const answer = straight(state, instant.observed, instant.now);
    look?.(answer, index);
  }
}

/** Throws at the first step at which the two do not say the same. */
function compare(instants: Instant[], ready: Memory): number {
  const answers: Answer[] = [];
  playStraight(instants, (answer) => answers.push(answer));
  let switchings = 0;
  const look = (result: StepResult, index: number) => {
    const core = {
      states: result.channels.map((one) => one.state),
      claims: result.channels.map((one) => one.claim),
      wakeAt: result.wakeAt,
    };
    switchings += result.events.filter((one) => one.kind === 'switching').length;
    const [a, b] = [JSON.stringify(core), JSON.stringify(answers[index])];
    if (a !== b) throw new Error(`Step ${index} of the night differs: core ${a}, by hand ${b}.`);
  };
  playCore(instants, ready, { look });
  return switchings;
}

/** The thresholds of the rules in force, as the library would be told them. */
function engine(): Engine {
  const rules = new Engine();
  for (const { config } of plan.rules) {
    const { purpose, point, band } = config.body;
    for (const { low, high } of band) {
      rules.addRule({
        conditions: { all: [{ fact: point, operator: 'lessThan', value: low }] },
        event: { type: purpose === 'warm' ? 'on' : 'off' },
      });
      rules.addRule({
        conditions: { all: [{ fact: point, operator: 'greaterThan', value: high }] },
        event: { type: purpose === 'warm' ? 'off' : 'on' },
      });
    }
  }
  return rules;
}

export async function bench() {
  const { instants, ready } = night();
  const switchings = compare(instants, ready);
  // ten nights a round: a night takes some ms, and after a collection of garbage the first of them finds no cache warm
  const over = await ratio(
    () => {
      for (let again = 0; again < NIGHTS; again += 1) playCore(instants, ready);
    },
    () => {
      for (let again = 0; again < NIGHTS; again += 1) playStraight(instants);
    },
    { rounds: 15, warmUp: 8, clock: 'cpu' },
  );
  const some = instants.slice(0, 600);
  const facts = some.map(({ values }) =>
    Object.fromEntries(plan.points.map((one, index) => [one.key, values[index] ?? 0])),
  );
  const rules = engine();
  const library = await ratio(
    async () => {
      for (const one of facts) await rules.run(one);
    },
    () => {
      for (let again = 0; again < NIGHTS; again += 1) playCore(some, ready);
    },
    { rounds: 7, clock: 'cpu' },
  );
  const aStep = (ms: number) => round3((1000 * ms) / instants.length);
  const settledMs = await timeMs(() => playCore(instants, ready, { anew: true }), 'cpu');
  return {
    overStraight: over.median,
    spread: over.spread,
    engineOver: round3(library.median * NIGHTS),
    engineSpread: library.spread.map((one) => round3(one * NIGHTS)),
    steps: instants.length,
    switchings,
    stepUs: aStep(quantile(over.raw.subject, 0.5) / NIGHTS),
    settledUs: aStep(settledMs),
    raw: { overStraight: over.raw, engineOver: library.raw },
  };
}
