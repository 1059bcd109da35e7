import { describe, expect, it } from 'vitest';
import type { Finding, FindingBody } from '@/lib/analysis/heap-facts';
import { heatRecord } from '@/lib/analysis/hygiene';
import { heapMix } from '@/lib/analysis/material-book';
import { adviseAddition, mixOf } from '@/lib/analysis/mix';
import { USUAL } from '@/lib/units/preferences';
import { findingWords } from '@/lib/wording/heap-findings';
import { heatRows, hours, ruleRows } from '@/lib/wording/heap-heat';
import { daysWord, dueWord } from '@/lib/wording/heap-job-days';
import { JOB_TEMPLATES, nextDay } from '@/lib/wording/heap-jobs';
import { adviceWords, mixNotes } from '@/lib/wording/heap-mix';
import { SMELL_WORDS, SQUEEZE_WORDS, sensed } from '@/lib/wording/heap-senses';
import { cornellMoisture } from '../checks/heap-book';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const finding = (body: FindingBody, change: Partial<Finding> = {}): Finding =>
  ({ ...body, urgency: 'soon', sure: 'measured', at: 0, mark: 'x', level: 0, step: 1, ...change }) as Finding;

describe('what nose and hand find', () => {
  it('ammonia asks for carbon, rotten egg is too wet', () => {
    const of = (word: string) => SMELL_WORDS.find((one) => one.word === word);
    expect(of('ammonia')?.then).toMatch(/^More carbon/);
    expect(of('rotten-egg')?.means).toMatch(/too wet/);
  });

  it('has something to do about each but what is well', () => {
    for (const one of [...SMELL_WORDS, ...SQUEEZE_WORDS]) expect(one.then === '').toBe(one.isWell);
  });

  it('reads as a sentence', () => {
    expect(sensed('rotten-egg', 'runs')).toBe('Smells of rotten egg, water runs when squeezed.');
    expect(sensed(null, 'crumbles')).toBe('Crumbles when squeezed.');
    expect(sensed(null, null)).toBe('');
  });
});

describe('a finding', () => {
  const all: FindingBody[] = [
    { kind: 'core-falls', changeK: -4.1, days: 7, hasTurned: false },
    { kind: 'recovery-slower', fromS: 1700, toS: 2400, sdS: 120, weeks: 5 },
    { kind: 'dry', squeeze: 'crumbles', moisture: null, sd: null },
    { kind: 'wet', squeeze: 'runs', smell: 'rotten-egg', moisture: null, sd: null },
    { kind: 'wet', squeeze: null, smell: null, moisture: 0.7, sd: 0.02 },
    { kind: 'cn-low', smell: 'ammonia', cn: null, sd: null },
    { kind: 'cn-high', cn: 64, sd: 9 },
    { kind: 'too-hot', celsius: 86, from: 'core', limit: 85 },
    { kind: 'uneven', hottestC: 50, coldestC: 20 },
  ];

  it.each(all.map((body) => [body.kind, body] as const))(
    '%s says why, how sure, what next and after whom',
    (_, body) => {
      const words = findingWords(finding(body), USUAL);
      for (const text of Object.values(words)) expect(text).toMatch(/\S.{5,}/);
      expect(words.source).toMatch(/no source|Cornell|CFR|NRCS/);
      expect(JSON.stringify(words)).not.toMatch(/null|NaN|undefined/);
    },
  );

  it('of a falling core is careful: probe and squeeze first, turn on a mild day with the fan off', () => {
    const { next } = findingWords(
      finding({ kind: 'core-falls', changeK: -4.1, days: 7, hasTurned: true }),
      USUAL,
    );
    expect(next).toMatch(/^Probe and squeeze it first\..*on a mild day, with the fan off/);
  });

  it('of a heap near fire does not send anybody to open it', () => {
    const hot: FindingBody = { kind: 'too-hot', celsius: 86, from: 'core', limit: 85 };
    expect(findingWords(finding(hot, { urgency: 'act' }), USUAL).next).toMatch(/^Do not open it alone/);
  });
});

describe('time at temperature', () => {
  it('is rounded down, so that no rounding lifts it over a limit', () => {
    expect([71.97, 72, 9.99, 0].map((value) => plain(hours(value)))).toEqual([
      '71 h',
      '72 h',
      '9.9 h',
      '0 h',
    ]);
  });

  it('says of each rule what was measured and whence it is, and never that it is met', () => {
    const steps = [{ from: 0, to: 72 * 3_600_000, least: 55, greatest: 56 }];
    const record = heatRecord(steps, []);
    if (record === null) throw new Error('there is a reading');
    const rows = ruleRows(record, USUAL);
    expect(rows.map((row) => row.note).join(' ')).not.toMatch(/approved|passed|complies|meets/i);
    expect(plain(rows[0]?.measured ?? '')).toBe('72 h of 72 h');
    for (const row of rows) expect(row.note).toMatch(/CFR/);
    expect(heatRows(record, 'UTC', { ...USUAL, temperature: 'F' })[0]?.name).toContain('131');
  });
});

describe('the mix', () => {
  const { grass, leaves } = cornellMoisture;
  it('says that both goals cannot be met with two materials and how the other comes out', () => {
    const mix = mixOf([grass]);
    const goals = { cn: 30, moisture: 0.6 };
    const words = adviceWords(mix, goals, 'leaves', adviseAddition(mix, goals, leaves)).map(plain);
    expect(words[0]).toBe('For 60 % water: add 6.8 kg of leaves; C:N is then 37 : 1.');
    expect(words[1]).toBe('For 30 : 1: add 3.5 kg of leaves; water is then 66 %.');
    expect(words[2]).toMatch(/^Both at once cannot be met with leaves and water/);
  });

  it('names what it leaves out', () => {
    const mix = heapMix([{ materials: [{ material: 'moon dust', kilograms: 5 }], litresOfWater: 0 }], []);
    expect(mixNotes(mix).join(' ')).toContain('Left out: moon dust');
  });
});

describe('the jobs of the year', () => {
  it('fall on the next such day, half a year later in the south', () => {
    expect(nextDay('09-15', '2026-12-01', 54)).toBe('2027-09-15');
    expect(nextDay('09-15', '2026-09-15', 54)).toBe('2026-09-15');
    expect(nextDay('09-15', '2026-12-01', -43)).toBe('2027-03-15');
    expect(nextDay('08-25', '2026-12-01', -43)).toBe('2027-02-25');
  });

  it('have lists, and the cautions that belong to them', () => {
    expect(JOB_TEMPLATES.map((job) => job.kind)).toEqual(['build', 'first-frost', 'spring', 'rebuild']);
    const lists = JOB_TEMPLATES.flatMap((job) => job.checklist).join(' ');
    for (const caution of [
      /carbon monoxide/,
      /never sucks/,
      /Residual-current/,
      /not an approval/,
      /Lift little/,
    ])
      expect(lists).toMatch(caution);
  });

  it.each([
    ['2026-12-01', 'today'],
    ['2026-12-02', 'tomorrow'],
    ['2026-11-30', 'due since yesterday'],
    ['2026-11-21', 'due for 10 days'],
    ['2026-12-20', 'in 19 days'],
    ['2027-09-15', 'in 9 months'],
  ])('%s is %s on 1 December', (day, words) => expect(daysWord(day, '2026-12-01')).toBe(words));

  it('have their day in words', () => expect(dueWord('2027-04-20')).toBe('20 April 2027'));
});
