/** Proofs: what an installer does to show that a relay moves its load, the right way, and lets go of it by itself. */
import { z } from 'zod';
import { PROOF_STEPS, RUN_KINDS } from '@/lib/analysis/proof';
import { Celsius, finite, Key, PageQuery, Why } from './common';
import { PhotographQuery } from './heap-view';

export const ProofOutcome = z.enum(['proved', 'given-up', 'rewired']);
export type ProofOutcome = z.infer<typeof ProofOutcome>;

const Figures = z.record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.null()]));
export type ProofFigures = z.infer<typeof Figures>;

/** One thing that was done. `without`: it could not be done, for the reason in the note, and the proof goes on. */
export const ProofRecord = z.strictObject({
  step: z.enum(PROOF_STEPS),
  result: z.enum(['done', 'failed', 'without', 'not-needed']),
  by: z.string(),
  at: z.string(),
  note: z.string().nullable(),
  figures: Figures,
});
export type ProofRecord = z.infer<typeof ProofRecord>;

/** The order of a run, as it was given. */
export const ProofRun = z.strictObject({
  kind: z.enum(RUN_KINDS),
  /** Of the order, in the house; null where nothing had to be ordered. */
  number: z.number().nullable(),
  by: z.string(),
  at: z.string(),
  seconds: z.number(),
  until: z.string(),
  /** When somebody stopped it before its time. */
  stoppedAt: z.string().nullable(),
  /** The node's start that it was ordered in, as far as it was known. */
  boot: z.string().nullable(),
});
export type ProofRun = z.infer<typeof ProofRun>;

export const ProofPicture = z.strictObject({
  id: z.string(),
  shows: z.enum(['plate', 'wiring']),
  width: z.number(),
  height: z.number(),
  by: z.string(),
  enteredAt: z.string(),
});
export type ProofPicture = z.infer<typeof ProofPicture>;

/** How a step stands. A step that is not needed says why. */
export const ProofStepStanding = z.strictObject({
  step: z.enum(PROOF_STEPS),
  state: z.enum(['done', 'without', 'failed', 'open', 'not-needed']),
  /** A word for why it is not needed, or for what it waits for; null where there is nothing to say. */
  because: z.string().nullable(),
  record: ProofRecord.nullable(),
});
export type ProofStepStanding = z.infer<typeof ProofStepStanding>;

/** What is known of a run from what the node reported. */
export const RunSeen = z.strictObject({
  kind: z.enum(RUN_KINDS),
  by: z.string(),
  at: z.string(),
  seconds: z.number(),
  until: z.string(),
  isOver: z.boolean(),
  /** When the relay reported the load on, and off again. */
  startedAt: z.string().nullable(),
  endedAt: z.string().nullable(),
  /** The claim that decides instead; null where the run decides, or is over. */
  heldBy: z.string().nullable(),
  /** The run proof's readings while it ran; null where there is none. */
  shown: z
    .strictObject({
      point: z.string(),
      unit: z.string(),
      above: z.number(),
      readings: z.number(),
      greatest: z.number().nullable(),
    })
    .nullable(),
  /** Return minus intake, K; null where it cannot be told. */
  gain: z.strictObject({ kelvin: z.number(), sd: z.number() }).nullable(),
  /** How the node let go of the coil while nobody commanded it; null where it has not. */
  fell: z
    .strictObject({ how: z.enum(['lease', 'restart']), at: z.string(), awayS: z.number().nullable() })
    .nullable(),
});
export type RunSeen = z.infer<typeof RunSeen>;

export const Proof = z.strictObject({
  id: z.string(),
  revision: z.number(),
  channel: z.string(),
  begunBy: z.string(),
  begunAt: z.string(),
  endedBy: z.string().nullable(),
  endedAt: z.string().nullable(),
  outcome: ProofOutcome.nullable(),
  endedWhy: z.string().nullable(),
  steps: z.array(ProofStepStanding),
  records: z.array(ProofRecord),
  /** The last of each kind. */
  runs: z.array(RunSeen),
  pictures: z.array(ProofPicture),
});
export type Proof = z.infer<typeof Proof>;

export const ProofQuery = z.strictObject({
  ...PageQuery.shape,
  channel: z.string().min(1).max(140).optional(),
});
export const ProofBegin = z.strictObject({ channel: Key });

const yes = (error: string) => z.literal(true, { error });
const note = { note: z.string().trim().max(500, 'At most 500 characters.').optional() };

/** A step that is taken. What the program can see for itself it looks up, and does not ask. */
export const ProofStepTake = z.discriminatedUnion(
  'step',
  [
    z.strictObject({
      step: z.literal('dead'),
      testerBefore: yes('Prove the tester on a known live source first.'),
      circuitDead: yes('The circuit must be dead at the board before anybody reaches in.'),
      testerAfter: yes('Prove the tester again: one that died meanwhile calls everything dead.'),
      ...note,
    }),
    z.strictObject({ step: z.literal('rating'), ...note }),
    z.strictObject({
      step: z.literal('photographs'),
      /** Why there are none. */
      without: Why.optional(),
    }),
    z.strictObject({
      step: z.literal('clear'),
      peopleClear: yes('Nobody may be at the load when it starts.'),
      isolatorOn: yes('With the isolator open the run would show nothing.'),
      ...note,
    }),
    z.strictObject({
      step: z.literal('seen'),
      saw: z.enum(['right', 'wrong-way', 'nothing'], {
        error: 'Say what you saw: right, wrong-way or nothing.',
      }),
      ...note,
    }),
    z.strictObject({ step: z.literal('current'), ...note }),
    z.strictObject({
      step: z.literal('gain'),
      /** Why there was no gain run. */
      without: Why.optional(),
    }),
    z.strictObject({
      step: z.literal('unplugged'),
      fell: z.boolean({ error: 'Say whether the load fell to its safe state by itself.' }),
      ...note,
    }),
    z.strictObject({
      step: z.literal('fallback'),
      ran: z.boolean({ error: 'Say whether the load ran by its fallback.' }),
      ...note,
    }),
    z.strictObject({
      step: z.literal('last-resort'),
      /** What it is set to, and the air at which it came on, °C. */
      below: finite(-40, 15, '°C').optional(),
      cameOnAt: Celsius.optional(),
      /** Why nobody has seen one come on. */
      without: Why.optional(),
      ...note,
    }),
  ],
  { error: `Name a step: ${PROOF_STEPS.filter((one) => one !== 'run').join(', ')}.` },
);
export type ProofStepTake = z.infer<typeof ProofStepTake>;

export const SHORTEST_RUN_S = 3;
export const LONGEST_PULSE_S = 60;
export const LONGEST_GAIN_S = 600;
export const ProofRunOrder = z
  .strictObject({
    kind: z.enum(RUN_KINDS, { error: 'Name the run: pulse, gain or unplug.' }),
    seconds: z
      .number({ error: 'Give whole seconds.' })
      .int('Give whole seconds.')
      .min(SHORTEST_RUN_S, `At least ${SHORTEST_RUN_S} s.`)
      .max(LONGEST_GAIN_S, `At most ${LONGEST_GAIN_S} s.`)
      .optional(),
  })
  .refine(({ kind, seconds }) => kind !== 'pulse' || seconds === undefined || seconds <= LONGEST_PULSE_S, {
    path: ['seconds'],
    error: `A pulse lasts ${LONGEST_PULSE_S} s at most.`,
  })
  .refine(({ kind, seconds }) => kind !== 'unplug' || seconds === undefined, {
    path: ['seconds'],
    error: `The run for unplugging lasts ${LONGEST_PULSE_S} s: longer than a lease, so that the lease is what ends it.`,
  });
export const ProofGiveUp = z.strictObject({ why: Why });
export const ProofPictureSend = z.strictObject({
  shows: z.enum(['plate', 'wiring'], { error: 'Say what it shows: plate or wiring.' }),
});
export const ProofPictureQuery = PhotographQuery;
