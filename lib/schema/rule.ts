import { z } from 'zod';
import { Celsius, DayTime, finite, Key, MonthDay, Name, wholeSeconds, Why } from './common';

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
    value: z.union([z.number(), z.boolean(), z.array(z.number()).min(1).max(50)]),
  })
  .refine((leaf) => (leaf.operator === 'in' || leaf.operator === 'notIn') === Array.isArray(leaf.value), {
    path: ['value'],
    error: 'A list goes with in and notIn only; a single value with the others.',
  });

const Node: z.ZodType<ConditionNode> = z.lazy(() => z.union([ConditionLeaf, ConditionTree]));
export const ConditionTree: z.ZodType<ConditionTree> = z
  .lazy(() =>
    z.union([
      z.strictObject({ all: z.array(Node).min(1).max(50) }),
      z.strictObject({ any: z.array(Node).min(1).max(50) }),
      z.strictObject({ not: Node }),
    ]),
  )
  .meta({ id: 'ConditionTree' });

export const BandPeriod = z
  .strictObject({
    from: DayTime,
    low: Celsius,
    high: Celsius,
  })
  .refine((period) => period.high - period.low >= 0.5, {
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

export const RuleBody = z.strictObject({
  purpose: z.enum(['warm', 'cool']),
  point: Key,
  standIns: z
    .array(z.strictObject({ point: Key, offset: finite(-30, 30, 'K').default(0) }))
    .max(5)
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
  only: ConditionTree.optional(),
  season: z.strictObject({ from: MonthDay, to: MonthDay }).optional(),
  hours: z.strictObject({ from: DayTime, to: DayTime }).optional(),
});
export type RuleBody = z.infer<typeof RuleBody>;
/** As a form or a program gives it, before defaults. */
export type RuleBodyInput = z.input<typeof RuleBody>;

export const RuleCreate = z.strictObject({ name: Name, channel: Key, body: RuleBody });
export const RuleAmend = z.strictObject({ name: Name.optional() });
export const RuleForce = z.strictObject({ why: Why, acceptUnproved: z.boolean().optional() });
export const RuleRetire = z.strictObject({ why: Why });
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
