import { describe, expect, it } from 'vitest';
import { bodyOf, issuesOf, nested, sectionsOf, valuesOf, type Group } from '@/components/wiring/spec';
import { USUAL } from '@/lib/units/preferences';

const american = { ...USUAL, temperature: 'F' } as const;
const groups: Group[] = [
  {
    specs: [
      { as: 'text', path: 'name', label: 'Name' },
      { as: 'number', path: 'coreFloor', label: 'Floor', quantity: 'temperature', empty: 'null' },
      { as: 'number', path: 'load.watts', label: 'Power', quantity: 'number', empty: 'omit' },
      { as: 'check', path: 'frostHelp', label: 'Helps' },
      { as: 'choice', path: 'contact', label: 'Contact', options: [{ value: 'NO', label: 'NO' }] },
    ],
  },
  {
    nullUnless: { path: 'highLimit', unless: 'highLimit.point' },
    specs: [
      { as: 'choice', path: 'highLimit.point', label: 'Point', options: [], empty: 'null' },
      { as: 'number', path: 'highLimit.above', label: 'Above', quantity: 'temperature' },
    ],
  },
];
const entity = {
  name: 'Gate heap',
  coreFloor: 38,
  load: { watts: 12 },
  frostHelp: true,
  contact: 'NO',
  highLimit: { point: 'bench-2', above: 28 },
};

describe('a form made of specs', () => {
  it('shows an entity in the reader’s units and sends back the same', () => {
    const values = valuesOf(groups, entity, american);
    expect(values).toMatchObject({ coreFloor: '100.4', highLimit: { above: '82.4' } });
    expect(bodyOf(groups, values, american)).toEqual({ body: entity, errors: {} });
  });

  it('sends null, leaves out, or asks, as each empty field means', () => {
    const values = { ...valuesOf(groups, null, USUAL), name: ' ' };
    const { body, errors } = bodyOf(groups, values, USUAL);
    expect(body).toEqual({ coreFloor: null, frostHelp: false, highLimit: null });
    expect(errors).toEqual({ name: 'This is missing.', contact: 'Choose one.' });
  });

  it('asks for the rest of a group once its first field is given', () => {
    const values = { ...valuesOf(groups, entity, USUAL), highLimit: { point: 'bench-2', above: '' } };
    expect(bodyOf(groups, values, USUAL).errors).toEqual({
      'highLimit.above': 'Give a number in °C, such as 4.5.',
    });
  });

  it('does not drop what was typed beside a first field that was left empty', () => {
    const first = valuesOf(groups, { ...entity, highLimit: null }, USUAL);
    const typed = { ...first, highLimit: { point: '', above: '28' } };
    expect(bodyOf(groups, typed, USUAL, first).errors).toEqual({ 'highLimit.point': 'Choose one.' });
  });

  it('takes away what was there when its first field is emptied', () => {
    const first = valuesOf(groups, entity, USUAL);
    const emptied = { ...first, highLimit: { point: '', above: '28' } };
    expect(bodyOf(groups, emptied, USUAL, first)).toMatchObject({ body: { highLimit: null }, errors: {} });
  });

  it('shows groups that fold together as one section', () => {
    const [a, b] = groups;
    if (a === undefined || b === undefined) throw new Error('two groups are needed');
    const folded = [a, { ...b, folded: 'More' }, { ...a, folded: 'More' }, { ...b, folded: 'Yet more' }];
    expect(sectionsOf(folded).map((section) => section.length)).toEqual([1, 2, 1]);
  });

  it('says what it could not read, and sends no guess of it', () => {
    const values = { ...valuesOf(groups, entity, USUAL), coreFloor: '1,500.5' };
    const { body, errors } = bodyOf(groups, values, USUAL);
    expect(errors).toEqual({ coreFloor: 'Give a number in °C, such as 4.5.' });
    expect(body).not.toHaveProperty('coreFloor');
  });

  it('keeps an error that no field shows for the form as a whole', () => {
    const issues = [
      { path: ['load', 'watts'], message: 'too much' },
      { path: ['fallback'], message: 'odd' },
      { path: ['load', 'watts'], message: 'second' },
    ];
    expect(issuesOf(issues, groups)).toEqual({ 'load.watts': 'too much', '': 'odd' });
    expect(nested({ 'load.watts': 'too much', '': 'odd' })).toEqual({
      load: { watts: { type: 'said', message: 'too much' } },
      root: { type: 'said', message: 'odd' },
    });
  });
});
