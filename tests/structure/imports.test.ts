import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import path from 'node:path';
import { cruise, type ICruiseOptions, type ICruiseResult } from 'dependency-cruiser';
import extractTSConfig from 'dependency-cruiser/config-utl/extract-ts-config';
import { afterEach, describe, expect, it } from 'vitest';
import { BUILD, ROOT } from '../../scripts/places.mjs';

interface Settings {
  forbidden: { name: string }[];
  options: ICruiseOptions & { enhancedResolveOptions: object };
}
const settings = createRequire(import.meta.url)('../../.dependency-cruiser.cjs') as Settings;
const FOLDERS = ['app', 'components', 'db', 'lib', 'worker'];

/** Broken rules as "rule: from → to". */
async function broken(baseDir: string, folders: string[]): Promise<string[]> {
  const { enhancedResolveOptions, ...options } = settings.options;
  const { output } = await cruise(
    folders,
    {
      ...options,
      baseDir,
      validate: true,
      ruleSet: { forbidden: settings.forbidden } as NonNullable<ICruiseOptions['ruleSet']>,
      tsConfig: { fileName: path.join(baseDir, 'tsconfig.json') },
    },
    enhancedResolveOptions,
    { tsConfig: extractTSConfig(path.join(baseDir, 'tsconfig.json')) },
  );
  const result = output as ICruiseResult; // text only with a reporter, and none is asked for
  return result.summary.violations.map(({ rule, from, to }) => `${rule.name}: ${from} → ${to}`);
}

it('nobody imports what is not theirs, and nothing imports itself round a corner', async () => {
  expect(await broken(ROOT, FOLDERS)).toEqual([]);
}, 120_000);

describe('each rule can fail', () => {
  let folder = '';
  afterEach(() => rmSync(folder, { recursive: true, force: true }));

  /** Inside the project, so that packages are found. */
  async function planted(files: Record<string, string>): Promise<string[]> {
    mkdirSync(BUILD, { recursive: true });
    folder = mkdtempSync(path.join(BUILD, 'planted-'));
    for (const [file, text] of Object.entries({ ...files, 'tsconfig.json': '{}' })) {
      mkdirSync(path.join(folder, path.dirname(file)), { recursive: true });
      // the resolver keeps the real tree's alias for the whole process, so plants name their files relatively
      const toRoot = '../'.repeat(file.split('/').length - 1);
      writeFileSync(path.join(folder, file), text.replaceAll("'@/", `'${toRoot}`));
    }
    const folders = [...new Set(Object.keys(files).map((file) => file.split('/')[0] ?? ''))];
    return broken(folder, folders);
  }

  const empty = 'export const x = 1;';
  const from = (to: string) => `import { x } from '${to}'; export const y = x;`;
  const plants: [rule: string, file: string, text: string, other?: string][] = [
    ['core-units', 'lib/units/a.ts', from('@/lib/physics/b'), 'lib/physics/b.ts'],
    ['core-physics', 'lib/physics/a.ts', from('@/lib/control/b'), 'lib/control/b.ts'],
    ['core-control', 'lib/control/a.ts', from('@/lib/analysis/b'), 'lib/analysis/b.ts'],
    ['core-control', 'lib/control/a.ts', "import fs from 'node:fs'; export const y = fs;"],
    ['core-control', 'lib/control/a.ts', "import type { FC } from 'react'; export type Y = FC;"],
    ['core-control', 'lib/control/a.ts', from('@/lib/schema/b'), 'lib/schema/b.ts'],
    ['core-analysis', 'lib/analysis/a.ts', from('@/lib/wording/b'), 'lib/wording/b.ts'],
    ['core-wording', 'lib/wording/a.ts', from('pg')],
    ['schemas', 'lib/schema/a.ts', from('@/db/b'), 'db/b.ts'],
    ['schemas', 'lib/field/a.ts', from('luxon')],
    ['db', 'db/a.ts', from('@/lib/server/permissions'), 'lib/server/permissions.ts'],
    ['db', 'db/a.ts', from('@/worker/b'), 'worker/b.ts'],
    ['server', 'lib/server/a.ts', from('@/app/b'), 'app/b.ts'],
    ['server-without-next', 'lib/server/a.ts', from('next/headers')],
    ['components', 'components/a.tsx', from('@/db/b'), 'db/b.ts'],
    ['components', 'components/a.tsx', from('@/lib/server/permissions'), 'lib/server/permissions.ts'],
    ['components-without-node', 'components/a.tsx', from('node:path')],
    ['app', 'app/a.ts', from('@/worker/b'), 'worker/b.ts'],
    ['worker', 'worker/a.ts', from('@/components/b'), 'components/b.ts'],
    ['worker', 'worker/a.ts', from('react')],
    ['yard', 'worker/yard/a.ts', from('@/lib/control/b'), 'lib/control/b.ts'],
    ['yard', 'worker/yard/a.ts', from('@/db/b'), 'db/b.ts'],
    ['yard', 'worker/yard/a.ts', from('pg')],
    ['yard-is-a-process', 'worker/a.ts', from('./yard/b'), 'worker/yard/b.ts'],
    ['demo-history-only-world', 'worker/jobs/demo-history.ts', from('../yard/b'), 'worker/yard/b.ts'],
    ['door', 'worker/door/a.ts', from('@/lib/units/b'), 'lib/units/b.ts'],
    ['door', 'worker/door/a.ts', from('zod')],
    ['door-is-a-process', 'worker/a.ts', from('./door/b'), 'worker/door/b.ts'],
    ['nobody-imports-these', 'lib/units/a.ts', from('@/tests/b'), 'tests/b.ts'],
    ['drizzle-in-db', 'worker/a.ts', from('drizzle-orm')],
    ['resolvable', 'lib/units/a.ts', from('./gone')],
  ];

  it.each(plants)('%s: %s', async (rule, file, text, other) => {
    const found = await planted({ [file]: text, ...(other === undefined ? {} : { [other]: empty }) });
    expect(found.some((line) => line.startsWith(`${rule}: ${file}`))).toBe(true);
  });

  it('no-cycle: type imports count', async () => {
    const found = await planted({
      'lib/units/a.ts': "import type { B } from './b'; export type A = B[];",
      'lib/units/b.ts': "import type { A } from './a'; export type B = A[];",
    });
    expect(found.some((line) => line.startsWith('no-cycle'))).toBe(true);
  });

  it('worker-never-reaches-next: by way of another file', async () => {
    const found = await planted({
      'worker/a.ts': from('@/lib/server/auth'),
      'lib/server/auth.ts': `${from('./next-session')} export { y as x };`,
      'lib/server/next-session.ts': empty,
    });
    expect(found.some((line) => line.startsWith('worker-never-reaches-next: worker/a.ts'))).toBe(true);
  });

  it('every rule has a plant', () => {
    const proved = new Set([...plants.map(([rule]) => rule), 'no-cycle', 'worker-never-reaches-next']);
    expect(settings.forbidden.map(({ name }) => name).filter((name) => !proved.has(name))).toEqual([]);
  });

  it('what is allowed is let through', async () => {
    const found = await planted({
      'lib/units/a.ts': "import { z } from 'zod'; export const x = z;",
      'lib/control/a.ts': from('@/lib/units/a'),
      'lib/schema/a.ts':
        "import { z } from 'zod'; import { x } from '@/lib/units/a'; export const y = [z, x];",
      'lib/server/env.ts': empty,
      'db/a.ts':
        "import { x } from '@/lib/server/env'; import { sql } from 'drizzle-orm'; export const y = [x, sql];",
      'components/a.tsx':
        "import { y } from '@/lib/schema/a'; import { useState } from 'react'; export const c = [y, useState];",
      'worker/yard/world.ts':
        "import { hostname } from 'node:os'; import { WebSocket } from 'ws'; export const x = [hostname, WebSocket];",
      'worker/jobs/demo-history.ts': from('../yard/world'),
      'worker/door/a.ts':
        "import http from 'node:http'; import { createProxyServer } from 'http-proxy-3'; import sirv from 'sirv'; export const x = [http, createProxyServer, sirv];",
    });
    expect(found).toEqual([]);
  });
});
