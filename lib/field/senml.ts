/**
 * SenML, RFC 8428: from a pack of records with base fields to resolved records, each standing alone.
 * A record that is wrong is refused by itself with its reason; the rest of the pack is kept.
 * What the values mean (names, units, data types that are no measurement) is `pack.ts`.
 */
import type { RefusedRecord } from './frames';

/** Times under this are relative to now (RFC 8428, 4.5.3): 2^28 s, some eight and a half years. */
export const relativeBelowS = 2 ** 28;

/** The version of SenML that is understood; `bver` above it refuses the whole pack. */
export const senmlVersion = 10;

const namePattern = /^[A-Za-z0-9][A-Za-z0-9\-:./_]*$/;
const valueFields = ['v', 'vs', 'vb', 'vd'] as const;
const numberFields = ['bver', 'bt', 'bv', 'bs', 't', 'v', 's', 'ut'];
const textFields = ['bn', 'bu', 'n', 'u', 'vs', 'vd'];
const baseFields = ['bn', 'bt', 'bu', 'bv', 'bs'] as const;
const knownFields = new Set<string>([...numberFields, ...textFields, 'vb']);

/** A record that stands alone: full name, absolute time, base value added. */
export interface ResolvedRecord {
  /** where it stood in the pack as sent */
  index: number;
  n: string;
  u?: string;
  /** Unix seconds */
  t: number;
  v?: number;
  vs?: string;
  vb?: boolean;
  vd?: string;
  s?: number;
}

export interface ResolvedPack {
  /** in order of time; of one time, as sent */
  records: ResolvedRecord[];
  refused: RefusedRecord[];
}

type BaseField = (typeof baseFields)[number];
type Bases = Partial<Record<BaseField, unknown>>;

class Refusal extends Error {}

/**
 * Resolves a pack (RFC 8428, 4.6).
 *
 * @param pack the records as parsed from JSON; nothing about them is assumed
 * @param nowS Unix seconds to which relative times are added
 * @example resolvePack([{ bn: 'a/', n: 'b', v: 1, t: -5 }], 1e9) // a/b at 999999995
 */
export function resolvePack(pack: readonly unknown[], nowS: number): ResolvedPack {
  const records: ResolvedRecord[] = [];
  const refused: RefusedRecord[] = [];
  const version = versionProblem(pack);
  const bases: Bases = {};
  pack.forEach((entry, index) => {
    const record = isRecord(entry) ? entry : undefined;
    // A base field holds from its record on even if that record is refused for something else.
    for (const field of baseFields) {
      if (record !== undefined && field in record) bases[field] = record[field];
    }
    try {
      if (version !== undefined) throw new Refusal(version);
      if (record === undefined) throw new Refusal('a record must be an object');
      const resolved = resolve(record, index, bases, nowS);
      if (resolved !== undefined) records.push(resolved);
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      refused.push({ index, name: nameOf(record, bases), why: error.message });
    }
  });
  records.sort((a, b) => a.t - b.t);
  return { records, refused };
}

function versionProblem(pack: readonly unknown[]): string | undefined {
  const versions = pack.filter(isRecord).flatMap((record) => ('bver' in record ? [record['bver']] : []));
  const wrong = versions.find((bver) => !Number.isInteger(bver) || Number(bver) < 1);
  if (wrong !== undefined) return 'bver must be a whole number above 0';
  if (versions.some((bver) => Number(bver) > senmlVersion)) {
    return `SenML of a version above ${senmlVersion} is not understood`;
  }
  return versions.some((bver) => bver !== versions[0])
    ? 'bver must be the same all through a pack'
    : undefined;
}

function resolve(
  record: Record<string, unknown>,
  index: number,
  bases: Bases,
  nowS: number,
): ResolvedRecord | undefined {
  for (const field of Object.keys(record)) {
    if (field.endsWith('_') && !knownFields.has(field)) {
      throw new Refusal(`the field "${field.slice(0, 40)}" must be understood, and is not`);
    }
  }
  for (const field of numberFields) finiteOr(record[field], field, 0);
  for (const field of textFields) textOr(record[field], field);
  // Bases may come from an earlier record that was refused for them: then whoever leans on them is too.
  const baseName = textOr(bases.bn, 'bn') ?? '';
  const baseTime = finiteOr(bases.bt, 'bt', 0);
  const baseValue = finiteOr(bases.bv, 'bv', 0);
  const unit = textOr(record['u'], 'u') ?? textOr(bases.bu, 'bu');

  const values = valueFields.filter((field) => field in record);
  const hasSum = 's' in record || (values.length > 0 && bases.bs !== undefined);
  if (values.length === 0 && !hasSum) {
    if (!('n' in record || 't' in record || 'u' in record)) return undefined;
    throw new Refusal('there is no value');
  }
  if (values.length > 1) throw new Refusal(`more than one value: ${values.join(', ')}`);
  if ('vb' in record && typeof record['vb'] !== 'boolean') throw new Refusal('vb must be true or false');

  const n = baseName + (textOr(record['n'], 'n') ?? '');
  if (!namePattern.test(n)) {
    throw new Refusal(
      n === ''
        ? 'there is no name'
        : 'the name may only hold A-Z a-z 0-9 - : . / _, from a letter or digit on',
    );
  }
  const time = baseTime + finiteOr(record['t'], 't', 0);
  return {
    index,
    n,
    ...(unit === undefined ? {} : { u: unit }),
    t: time < relativeBelowS ? nowS + time : time,
    ...('v' in record ? { v: baseValue + finiteOr(record['v'], 'v', 0) } : {}),
    ...('vs' in record ? { vs: textOr(record['vs'], 'vs') ?? '' } : {}),
    ...('vb' in record ? { vb: record['vb'] === true } : {}),
    ...('vd' in record ? { vd: textOr(record['vd'], 'vd') ?? '' } : {}),
    ...(hasSum ? { s: finiteOr(bases.bs, 'bs', 0) + finiteOr(record['s'], 's', 0) } : {}),
  };
}

function isRecord(entry: unknown): entry is Record<string, unknown> {
  return typeof entry === 'object' && entry !== null && !Array.isArray(entry);
}

function finiteOr(value: unknown, field: string, otherwise: number): number {
  if (value === undefined) return otherwise;
  if (typeof value !== 'number') throw new Refusal(`${field} must be a number`);
  if (!Number.isFinite(value)) throw new Refusal(`${field} is not a finite number`);
  return value;
}

function textOr(value: unknown, field: string): string | undefined {
  if (value === undefined || typeof value === 'string') return value;
  throw new Refusal(`${field} must be text`);
}

/** The name as far as it can be read, cut short: a refusal must be findable, not an echo. */
function nameOf(record: Record<string, unknown> | undefined, bases: Bases): string {
  const part = (value: unknown): string => (typeof value === 'string' ? value : '');
  return (part(bases.bn) + part(record?.['n'])).slice(0, 200);
}
