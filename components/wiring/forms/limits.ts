import type { Group } from '../spec';
import { pointOptions, type Yard } from './options';

const SECTION = 'Limits and proofs';

const highLimit = (yard: Yard): Group => ({
  folded: SECTION,
  title: 'High limit',
  note: 'The load is switched off above it, whatever asks for the load, and while the point there cannot be read.',
  nullUnless: { path: 'highLimit', unless: 'highLimit.point' },
  specs: [
    {
      as: 'choice',
      path: 'highLimit.point',
      label: 'High limit at',
      options: pointOptions(yard.points),
      empty: 'null',
      none: 'No high limit',
    },
    { as: 'number', path: 'highLimit.above', label: 'Off above', quantity: 'temperature' },
  ],
});

const runs: Group = {
  folded: SECTION,
  title: 'Runs and starts',
  note: 'After its longest run the load goes off until nothing has asked for it once. A rule that would start it oftener than this is pointed out before it goes into force.',
  specs: [
    {
      as: 'number',
      path: 'longestOn',
      label: 'On without a break, at most',
      quantity: 'minutes',
      empty: 'null',
      hint: 'Empty: no limit.',
    },
    {
      as: 'number',
      path: 'startsPerHour',
      label: 'Starts an hour, at most',
      quantity: 'number',
      empty: 'null',
      hint: 'As its maker allows. Empty: not told.',
    },
  ],
};

const runProof = (yard: Yard): Group => ({
  folded: SECTION,
  title: 'Proof of running',
  note: 'A point that shows that the load really runs, such as its current: the load runs while the point is above this.',
  nullUnless: { path: 'runProof', unless: 'runProof.point' },
  specs: [
    {
      as: 'choice',
      path: 'runProof.point',
      label: 'Shown by',
      options: pointOptions(yard.points, ['current', 'power', 'pressure', 'contact']),
      empty: 'null',
      none: 'Nothing shows it',
    },
    {
      as: 'number',
      path: 'runProof.above',
      label: 'Runs above',
      quantity: 'number',
      hint: 'In the unit that the point is kept in.',
    },
  ],
});

/** With several boxes each point says whose it is: a box goes by its own alone. */
function ownPoints(yard: Yard) {
  const measured = yard.points.filter((point) => point.unit === 'Cel' && point.derived === null);
  const options = pointOptions(measured, ['bench', 'house-air']);
  if (yard.nodes.length < 2) return options;
  const nodeOf = new Map(measured.map((point) => [point.key, point.node]));
  return options.map(({ value, label }) => ({ value, label: `${label}, box ${nodeOf.get(value) ?? ''}` }));
}

const fallback = (yard: Yard): Group => ({
  folded: SECTION,
  title: 'Fallback without the server',
  note: 'A small thermostat that the field box runs by itself while nobody speaks to it. It is kept here and sent with every command; the box must be able to run it, and one that cannot lets the load fall to its safe state.',
  nullUnless: { path: 'fallback', unless: 'fallback.point' },
  specs: [
    {
      as: 'choice',
      path: 'fallback.point',
      label: 'Goes by',
      options: ownPoints(yard),
      empty: 'null',
      none: 'No fallback',
      hint: 'A point that the same box measures.',
    },
    { as: 'number', path: 'fallback.below', label: 'On below', quantity: 'temperature' },
    { as: 'number', path: 'fallback.above', label: 'Off over', quantity: 'temperature' },
    { as: 'number', path: 'fallback.onFor', label: 'On at a time, at most', quantity: 'minutes' },
    { as: 'number', path: 'fallback.offFor', label: 'Then off, at least', quantity: 'minutes' },
  ],
});

const flow: Group = {
  folded: SECTION,
  title: 'Air it moves',
  note: 'Heat is reckoned from it: the air moved, times how much warmer it comes back. How far the flow may be out is how far the heat may be.',
  columns: 3,
  nullUnless: { path: 'flow', unless: 'flow.litresPerSecond' },
  specs: [
    {
      as: 'number',
      path: 'flow.litresPerSecond',
      label: 'Flow',
      quantity: 'litres-per-second',
      empty: 'null',
    },
    {
      as: 'choice',
      path: 'flow.from',
      label: 'Known from',
      options: [
        { value: 'measured', label: 'measured here' },
        { value: 'curve', label: 'the maker’s curve' },
        { value: 'rated', label: 'the rating plate' },
        { value: 'guessed', label: 'a guess' },
      ],
    },
    { as: 'number', path: 'flow.sd', label: 'Give or take', quantity: 'litres-per-second', empty: 'omit' },
  ],
};

export const protection: Group = {
  folded: 'Mains protection',
  title: 'What stands between the mains and the load',
  note: 'Over 50 V AC or 120 V DC: an enclosed contactor, a fuse, and a residual-current device. Proving asks for all of it. A licensed electrician does this work, under local code.',
  nullUnless: { path: 'protection', unless: 'protection.fuseAmps' },
  specs: [
    {
      as: 'number',
      path: 'protection.fuseAmps',
      label: 'Fuse or breaker',
      quantity: 'number',
      unit: 'A',
      empty: 'null',
      hint: 'Empty: no mains protection is told.',
    },
    {
      as: 'check',
      path: 'protection.contactor',
      label: 'Behind an enclosed contactor',
      hint: 'The relay switches its coil; the contact’s rating above is then the contactor’s.',
    },
    {
      as: 'number',
      path: 'protection.cableMm2',
      label: 'Cable',
      quantity: 'number',
      unit: 'mm²',
      empty: 'omit',
    },
    { as: 'text', path: 'protection.ip', label: 'Enclosure', empty: 'omit', hint: 'Its mark, such as IP65.' },
    {
      as: 'number',
      path: 'protection.rcdMilliamps',
      label: 'Residual-current device trips at',
      quantity: 'number',
      unit: 'mA',
      empty: 'omit',
    },
    {
      as: 'text',
      path: 'protection.rcdTestedOn',
      label: 'Last tested on',
      empty: 'omit',
      hint: 'YYYY-MM-DD, by its test button.',
    },
    {
      as: 'number',
      path: 'protection.rcdTestEveryMonths',
      label: 'Test it every',
      quantity: 'number',
      unit: 'months',
      empty: 'omit',
      hint: 'By local code. Empty: 6 months, common practice.',
    },
  ],
};

/** What bounds a channel and what proves it: all optional, folded into one section of the channel's form. */
export function limitGroups(yard: Yard): Group[] {
  return [highLimit(yard), runs, runProof(yard), fallback(yard), flow, protection];
}
