import { describe, expect, it } from 'vitest';
import { RULES, type Source } from './source-rules';
import { programFiles, textOf } from './tree';

describe('the program keeps its one-place rules', () => {
  const sources: Source[] = programFiles().map((file) => ({ file, text: textOf(file) }));

  it.each(RULES)('$name', ({ breaches }) => {
    const found = sources.flatMap((source) => breaches(source).map((breach) => `${source.file} ${breach}`));
    expect(found).toEqual([]);
  });
});

describe('each one-place rule can fail', () => {
  const plants: [rule: string, file: string, text: string][] = [
    ['environment', 'worker/a.ts', 'const x = process.env;'],
    ['environment', 'db/a.ts', "const x = process['env'].DATABASE_URL;"],
    ['environment', 'lib/server/a.ts', "import { env } from 'node:process';"],
    ['time', 'lib/control/a.ts', 'const x = Date.now();'],
    ['time', 'lib/field/a.ts', 'const x = new Date();'],
    ['time', 'lib/wording/a.ts', 'const x = Math.random();'],
    ['time', 'worker/hub/a.ts', 'setTimeout(() => {}, 5);'],
    ['time', 'worker/yard/a.ts', 'setInterval(() => {}, 5);'],
    ['time', 'worker/a.ts', 'const x = performance.now();'],
    ['time', 'worker/control/clock.ts', 'const x = Date.now();'],
    ['time', 'worker/a.ts', "import { setTimeout as pause } from 'node:timers/promises';"],
    ['role', 'app/(yard)/people/page.tsx', "const x = role === 'owner';"],
    ['role', 'components/a.tsx', 'const x = `installer`;'],
    ['server-side fetch', 'lib/server/a.ts', 'await fetch(address);'],
    ['server-side fetch', 'app/api/v1/a/route.ts', 'await fetch(address);'],
    ['no barrels', 'lib/units/all.ts', "export { a } from './a'; export * from './b';"],
    ['no barrels', 'lib/units/all.ts', "import { a } from './a'; export { a }; export { b } from './b';"],
  ];

  it.each(plants)('%s: %s: %s', (name, file, text) => {
    const rule = RULES.find((each) => each.name.startsWith(name));
    expect(rule?.breaches({ file, text })).not.toEqual([]);
  });

  const innocent: Source[] = [
    { file: 'lib/server/env.ts', text: 'const x = process.env;' },
    { file: 'instrumentation.ts', text: "if (process.env.NEXT_RUNTIME === 'nodejs') start();" },
    { file: 'lib/control/a.ts', text: 'const at = new Date(now); // not Date.now()' },
    { file: 'worker/clock.ts', text: 'const x = Date.now(); setTimeout(() => {}, 1);' },
    { file: 'worker/door/clock.ts', text: 'const x = performance.now();' },
    { file: 'lib/server/permissions.ts', text: "export const ROLES = ['owner', 'grower'];" },
    { file: 'components/a.tsx', text: "const x = 'owner@larkmoor.example'; await fetch('/api/v1/houses');" },
    { file: 'lib/units/a.ts', text: "export { b } from './b'; export const c = 1;" },
  ];
  it.each(innocent)('and lets $file through: $text', (source) => {
    expect(RULES.flatMap(({ breaches }) => breaches(source))).toEqual([]);
  });

  it('every rule has a plant', () => {
    const unproved = RULES.filter(({ name }) => !plants.some(([start]) => name.startsWith(start)));
    expect(unproved).toEqual([]);
  });
});
