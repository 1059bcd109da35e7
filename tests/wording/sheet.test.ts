// The sheet on the door: what it says must hold with the panel dead, and lead nobody to a live terminal.
import { describe, expect, it } from 'vitest';
import { USUAL } from '@/lib/units/preferences';
import { protectionOnPaper, withoutSoftware, type SheetLoad } from '@/lib/wording/sheet';

const fan: SheetLoad = {
  ...{ number: 1, label: 'Gate-heap fan', contact: 'NO', kind: 'motor', isDraw: true },
  rest: { longestDrawS: 2400, leastS: 1800 },
};
const stirrer: SheetLoad = {
  ...fan,
  number: 2,
  label: 'Air stirrer',
  contact: 'NC',
  isDraw: false,
  rest: null,
};
const mat: SheetLoad = { ...stirrer, number: 3, label: 'Bench mat', contact: 'NO', kind: 'heater' };
const text = (loads: SheetLoad[], last: { below: number; provedOn: string | null } | null = null) =>
  withoutSoftware(loads, last, USUAL).join('\n').replaceAll('\u00a0', ' ');

describe('how to run the fan without software', () => {
  it('begins with what guards the crop, and says so where nothing does', () => {
    expect(text([fan])).toMatch(
      /^First look at the crop’s own guard: no thermostat of last resort is recorded/,
    );
    expect(text([fan], { below: 1.5, provedOn: null })).toMatch(
      /under 1\.5 °C .*nobody has seen it work yet/,
    );
    expect(text([fan], { below: 1.5, provedOn: '2026-10-02' })).toContain('was seen to on 2026-10-02');
  });
  it('names what runs with the board dead: loads on NC contacts, and no other', () => {
    expect(text([fan, stirrer])).toContain(
      'these run, being on NC contacts: 2 Air stirrer. Only their isolators',
    );
    expect(text([fan])).toContain('every load here stands still');
  });
  it('has a fan run only by a fitted hand switch, with the draw and the rest of its rule', () => {
    const told = text([fan, mat]);
    expect(told).toContain('only by a hand switch that a qualified person has fitted');
    expect(told).toContain('Never put a wire or a tool across a contact.');
    expect(told).toContain('1 Gate-heap fan: at most 40 min at a time, then off for at least 30 min');
    expect(told).toContain('Never bridge a heater or its high limit: 3 Bench mat.');
    expect(told).toContain('do not isolate');
    expect(told).toContain('never sucks from it');
  });
  it('invents no rest where no rule in force has one', () => {
    expect(text([{ ...fan, rest: null }])).toContain('no rest is set by a rule in force');
  });
});

describe('protection', () => {
  const guard = { contactor: true, fuseAmps: 10, cableMm2: 1.5, ip: 'IP65', rcdMilliamps: 30 };
  const said = (given: Parameters<typeof protectionOnPaper>[0]) =>
    protectionOnPaper(given).replaceAll('\u00a0', ' ');

  it('is told as far as it was recorded, with the test of its residual-current device', () => {
    expect(said({ ...guard, rcdTestedOn: '2026-10-02' })).toMatch(/IP65, RCD 30 mA, tested 2026-10-02$/);
    expect(said(guard)).toMatch(/RCD 30 mA, test not recorded$/);
    expect(said({ contactor: false, fuseAmps: 4 })).toBe('no contactor, fuse 4 A, no RCD told');
  });

  it('that nobody recorded is told as such', () => {
    expect(said(null)).toBe('not recorded');
  });
});
