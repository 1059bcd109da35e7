import { z } from 'zod';
import { PageQuery } from './common';
import { Finding, RuleBody } from './rule';

export const RuleVersion = z.strictObject({
  id: z.string(),
  number: z.number(),
  status: z.enum(['draft', 'in-force', 'retired']),
  body: RuleBody,
  why: z.string().nullable(),
  by: z.string(),
  draftedAt: z.string(),
  forcedAt: z.string().nullable(),
  endedAt: z.string().nullable(),
  /** Who took it out of force or put another in its place; the why is that of retiring. */
  endedBy: z.string().nullable(),
  endedWhy: z.string().nullable(),
  /** Who let it drive a channel that nobody had proved; null where it was proved. */
  unproved: z.strictObject({ by: z.string(), at: z.string(), words: z.string().nullable() }).nullable(),
});
export type RuleVersion = z.infer<typeof RuleVersion>;

export const Rule = z.strictObject({
  id: z.string(),
  revision: z.number(),
  slug: z.string(),
  name: z.string(),
  house: z.string(),
  channel: z.string(),
  /** What is being written, else what is in force, else what was last. */
  body: RuleBody,
  draft: RuleVersion.nullable(),
  inForce: RuleVersion.nullable(),
  retiredAt: z.string().nullable(),
  /** Null while it is not retired. */
  retired: z
    .strictObject({ at: z.string(), by: z.string().nullable(), why: z.string().nullable() })
    .nullable(),
  /** The rule that this one began as a copy of; its name and house as they are now. */
  copiedFrom: z
    .strictObject({ rule: z.string(), name: z.string(), house: z.string(), version: z.number() })
    .nullable(),
});
export type Rule = z.infer<typeof Rule>;

export const RuleWithVersions = z.strictObject({ ...Rule.shape, versions: z.array(RuleVersion) });
export type RuleWithVersions = z.infer<typeof RuleWithVersions>;

export const RuleListQuery = z.strictObject({
  ...PageQuery.shape,
  /** Retired ones too. */
  retired: z.enum(['true', 'false']).default('false'),
});
export const Findings = z.strictObject({
  findings: z.array(Finding),
  /** What could not be looked at yet, for want of readings. */
  notKnown: z.array(z.string()),
});
export type Findings = z.infer<typeof Findings>;
