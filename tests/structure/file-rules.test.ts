import { describe, expect, it } from 'vitest';
import { giveaways, isLost, isOver, isTwiceOver, lengthOf, looseEnds, saysNothing } from './file-rules';
import { projectFiles, textOf } from './tree';

const TEXT = /\.(tsx?|mjs|cjs|json|md|sql|css|ya?ml|sh|txt)$|^\.[a-z]+|^\.ci\//;

describe('the project’s files', () => {
  const files = projectFiles();

  it('lie in the folders of the map', () => expect(files.filter(isLost)).toEqual([]));

  it('have names that say something', () => expect(files.filter(saysNothing)).toEqual([]));

  it('are at most twice as long as their budget', () => {
    const lengths = files.flatMap((file) => lengthOf(file, textOf(file)) ?? []);
    const over = lengths.filter(isOver).sort((a, b) => b.lines / b.budget - a.lines / a.budget);
    for (const { file, kind, lines, budget } of over) {
      console.info(`over the budget of a ${kind}: ${file}, ${lines} of ${budget} lines`);
    }
    expect(over.filter(isTwiceOver).map(({ file }) => file)).toEqual([]);
  });

  it('give away no registry and no path of a machine', () => {
    const found = files
      .filter((file) => TEXT.test(file))
      .flatMap((file) => giveaways(textOf(file)).map((what) => `${file}: ${what}`));
    expect(found).toEqual([]);
  });
});

it('nothing is left for later: no notes to do it, no test left out', () => {
  const found = projectFiles()
    .filter((file) => /\.(tsx?|mjs|cjs|sql|css)$/.test(file))
    .flatMap((file) => looseEnds(textOf(file)).map((what) => `${file}: ${what}`));
  expect(found).toEqual([]);
});

describe('each rule about files can fail', () => {
  it.each(['src/a.ts', 'lib/stuff/a.ts', 'components/a.tsx', 'worker/things/a.ts'])('%s is lost', (file) => {
    expect(isLost(file)).toBe(true);
  });

  it.each(['lib/units/utils.ts', 'worker/helpers/a.ts', 'db/misc.ts', 'lib/field/index.ts'])(
    '%s says nothing',
    (file) => expect(saysNothing(file)).toBe(true),
  );

  it.each(['lib/units/index-card.ts', 'app/page.tsx', 'lib/analysis/utilisation.ts'])(
    '%s says something',
    (file) => {
      expect(saysNothing(file)).toBe(false);
    },
  );

  it.each([
    ['app/(yard)/[house]/watch/page.tsx', 41, true, false],
    ['app/(yard)/[house]/watch/page.tsx', 81, true, true],
    ['app/api/v1/houses/route.ts', 60, false, false],
    ['components/watch/strip.tsx', 241, true, true],
    ['lib/control/step.ts', 201, true, false],
    ['tests/control/step.test.ts', 501, true, true],
  ])('%s of %i lines: over %s, twice over %s', (file, lines, over, twice) => {
    const length = lengthOf(file, 'x\n'.repeat(lines));
    expect(length && [isOver(length), isTwiceOver(length)]).toEqual([over, twice]);
  });

  it.each([
    ['https://registry', '.example.', 'org/x'],
    ['see /', 'work', '/main'],
    ['cd /', 'root', '/x'],
    ['"/', 'home', '/ann/x"'],
  ])('%s%s%s is a giveaway', (...parts) => {
    expect(giveaways(parts.join(''))).not.toEqual([]);
  });

  it.each([
    ['// TO', 'DO: later'],
    ['/* FIX', 'ME */'],
    ['it.', "skip('x', () => {})"],
    ['describe.', "only('x', () => {})"],
  ])('%s%s is a loose end', (...parts) => {
    expect(looseEnds(parts.join(''))).not.toEqual([]);
  });

  it.each(['/var/lib/postgresql', 'lib/work/x', './homework/x', 'network/main'])('%s is none', (text) => {
    expect(giveaways(text)).toEqual([]);
  });
});
