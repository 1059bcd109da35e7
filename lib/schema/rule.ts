import { z } from 'zod';
import { plain } from '@/lib/control/plain';
import { Celsius, DayTime, finite, Key, MEASURED_MOST, MonthDay, Name, wholeSeconds, Why } from './common';

export const OPERATORS = [
  'equal',
  'notEqual',
  'lessThan',
  'lessThanInclusive',
  'greaterThan',
  'greaterThanInclusive',
  'in',
  'notIn',
] as const;

export interface Condition {
  fact: string;
  operator: (typeof OPERATORS)[number];
  value: number | boolean | number[];
}
export type ConditionNode = Condition | ConditionTree;
/** json-rules-engine's own form, narrowed to what a relay may depend on: no paths, no params, no custom operators. */
export type ConditionTree = { all: ConditionNode[] } | { any: ConditionNode[] } | { not: ConditionNode };

const ConditionLeaf = z
  .strictObject({
    fact: z
      .string()
      .regex(
        /^(time\.(hour|month|weekday|sunUp)|[A-Za-z0-9][A-Za-z0-9._-]{0,62})$/,
        'Name a point by its key, or time.hour, time.month, time.weekday, time.sunUp.',
      ),
    operator: z.enum(OPERATORS),
    value: z.union([z.number(), z.boolean(), z.array(z.number()).min(1).max(50)], {
      error: 'Give a number, true or false, or (for in and notIn) a list of numbers.',
    }),
  })
  .refine((leaf) => (leaf.operator === 'in' || leaf.operator === 'notIn') === Array.isArray(leaf.value), {
    path: ['value'],
    error: 'A list goes with in and notIn only; a single value with the others.',
  })
  .refine(({ operator, value }) => typeof value !== 'boolean' || /^(not)?equal$/i.test(operator), {
    path: ['value'],
    error: 'Give a number: true or false goes with equal and notEqual only.',
  })
  .refine(({ value }) => [value].flat().every((one) => Math.abs(Number(one)) <= MEASURED_MOST), {
    path: ['value'],
    error: 'Give a number from −1,000,000,000 to 1,000,000,000: no point measures more.',
  });

const Node: z.ZodType<ConditionNode> = z.lazy(() => z.union([ConditionLeaf, ConditionTree]));
export const ConditionTree: z.ZodType<ConditionTree> = z
  .lazy(() =>
    z.union(
      [
        z.strictObject({ all: z.array(Node).min(1).max(50) }),
        z.strictObject({ any: z.array(Node).min(1).max(50) }),
        z.strictObject({ not: Node }),
      ],
      { error: 'A group of conditions has one of all, any or not, and nothing beside it.' },
    ),
  )
  .meta({ id: 'ConditionTree' });

/** Far over what a person writes or reads, and what keeps checks and steps of one rule cheap. */
export const MOST_CONDITIONS = 100;
export const DEEPEST_CONDITIONS = 12;

const sizeOf = (node: ConditionNode): { many: number; deep: number } => {
  if ('fact' in node) return { many: 1, deep: 0 };
  const inner = 'all' in node ? node.all : 'any' in node ? node.any : [node.not];
  const sizes = inner.map(sizeOf);
  return {
    many: sizes.reduce((sum, one) => sum + one.many, 0),
    deep: 1 + Math.max(...sizes.map((one) => one.deep)),
  };
};

const Only = ConditionTree.refine((tree) => sizeOf(tree).many <= MOST_CONDITIONS, {
  error: `A rule takes at most ${MOST_CONDITIONS} conditions.`,
}).refine((tree) => sizeOf(tree).deep <= DEEPEST_CONDITIONS, {
  error: `Conditions may stand at most ${DEEPEST_CONDITIONS} groups deep.`,
});

export const BandPeriod = z
  .strictObject({
    from: DayTime,
    low: Celsius,
    high: Celsius,
  })
  .refine((period) => plain(period.high - period.low) >= 0.5, {
    path: ['high'],
    error: 'Off above must be at least 0.5 °C over on below, or the fan would chatter.',
  });

export const Rest = z
  .strictObject({
    longestDraw: wholeSeconds(1, 86_400),
    least: wholeSeconds(1, 86_400),
    most: wholeSeconds(1, 172_800).optional(),
    until: z.strictObject({ point: Key, level: Celsius }).optional(),
    leastGain: z
      .strictObject({
        kelvin: finite(0.1, 60, 'K'),
        after: wholeSeconds(1, 86_400).default(900),
        intake: Key,
        return: Key,
      })
      .optional(),
    frostMayBreak: z.boolean().default(true),
  })
  .refine((rest) => rest.until === undefined || rest.most !== undefined, {
    path: ['most'],
    error: 'A rest that waits for a temperature needs a longest time.',
  })
  .refine((rest) => rest.most === undefined || rest.most >= rest.least, {
    path: ['most'],
    error: 'The longest rest cannot be shorter than the least.',
  });

export const RuleBody = z
  .strictObject({
    purpose: z.enum(['warm', 'cool']),
    point: Key,
    standIns: z
      .array(z.strictObject({ point: Key, offset: finite(-30, 30, 'K').default(0) }))
      .max(5)
      .refine(
        (standIns) => new Set(standIns.map((one) => one.point)).size === standIns.length,
        'Each point stands in once.',
      )
      .default([]),
    band: z
      .array(BandPeriod)
      .min(1, 'A rule needs a band.')
      .max(12)
      .refine(
        (band) => new Set(band.map((period) => period.from)).size === band.length,
        'Two periods begin at the same time.',
      ),
    rest: Rest.optional(),
    only: Only.optional(),
    season: z.strictObject({ from: MonthDay, to: MonthDay }).optional(),
    hours: z.strictObject({ from: DayTime, to: DayTime }).optional(),
  })
  .refine((body) => !body.standIns.some((one) => one.point === body.point), {
    path: ['standIns'],
    error: 'A point cannot stand in for itself: name another, or leave it out.',
  });
export type RuleBody = z.infer<typeof RuleBody>;
/** As a form or a program gives it, before defaults. */
export type RuleBodyInput = z.input<typeof RuleBody>;

export const RuleCreate = z.strictObject({ name: Name, channel: Key, body: RuleBody });
export const RuleAmend = z.strictObject({ name: Name.optional() });
export const RuleForce = z.strictObject({
  why: Why,
  acceptUnproved: z.boolean().optional(),
  /** What a person typed to accept it; kept with who and when. */
  consent: z.string().trim().max(200, 'At most 200 characters.').optional(),
});
export const RuleRetire = z.strictObject({ why: Why });
/** Without a version: what last was in force. Either way it comes back as a draft. */
export const RuleRestore = z.strictObject({ version: z.number().int().min(1).optional() });
/**
 * A draft of the same rule for another channel, in this house or another. Each point that the rule names is put through
 * `points`; in its own house a point that is left out stays itself.
 */
export const RuleCopy = z.strictObject({
  /** By slug or id; left out: the rule's own. */
  house: z.string().trim().min(1, 'Choose a house.').max(200).optional(),
  channel: Key,
  /** Left out: as the rule is called. */
  name: Name.optional(),
  /** Left out: the draft, else what is in force. */
  version: z.number().int().min(1).optional(),
  points: z
    .array(z.strictObject({ from: Key, to: Key }))
    .max(200)
    .default([]),
});
export type RuleCopy = z.infer<typeof RuleCopy>;
/** Check without a body looks at the draft (else at the version in force); with one, at what is being typed. */
export const RuleCheck = z.strictObject({ body: RuleBody.optional() });
/** Going back: an older version's body becomes the draft. */
export const RuleGoBack = z.strictObject({ version: z.number().int().min(1) });

export const Finding = z.strictObject({
  level: z.enum(['stop', 'look']),
  kind: z.string(),
  text: z.string(),
  paths: z.array(z.string()),
});
export type Finding = z.infer<typeof Finding>;
