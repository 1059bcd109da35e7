// Who may import whom. tests/structure/imports.test.ts runs this and proves for each rule that it can fail.
const CORES = ['units', 'physics', 'control', 'analysis', 'wording']; // each may import those to its left
const core = (name) => `^lib/${name}/`;
const packages = (...names) => `(^|/)node_modules/(@types/)?(${names.join('|')})(/|$)`;

const ZOD = packages('zod');
const PURE = packages('zod', 'luxon', 'suncalc', 'psychrolib', 'ml-levenberg-marquardt');
const SCREEN = packages(
  'react',
  'react-dom',
  'next',
  'recharts',
  'radix-ui',
  '@tanstack/react-query',
  'react-hook-form',
);
/** Node's own modules are let through. */
const NODE = { dependencyTypesNot: ['core'] };
const SCHEMAS = '^lib/(schema|field|live)/';
/** The one file of lib/server that may know Next; the worker never loads it. */
const NEXT_SESSION = '^lib/server/next-session\\.ts$';

/** From these files only what is listed may be imported. */
const only = (name, comment, from, allowed, more = {}) => ({
  name,
  comment,
  severity: 'error',
  from: { path: from },
  to: { pathNot: allowed, ...more },
});

module.exports = {
  forbidden: [
    { name: 'no-cycle', severity: 'error', from: {}, to: { circular: true } },
    {
      name: 'resolvable',
      comment: 'an import that leads nowhere',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true },
    },
    ...CORES.map((name, index) =>
      only(`core-${name}`, 'cores import the cores to their left and pure packages', core(name), [
        ...CORES.slice(0, index + 1).map(core),
        PURE,
      ]),
    ),
    only('schemas', 'schemas and frames: cores and zod', SCHEMAS, [...CORES.map(core), SCHEMAS, ZOD]),
    {
      name: 'db',
      comment: 'db: cores, lib/schema, and of lib/server only env',
      severity: 'error',
      from: { path: '^db/' },
      to: { path: ['^(app|components|worker)/', '^lib/(field|live)/', '^lib/server/(?!env\\.ts$)', SCREEN] },
    },
    {
      name: 'server',
      comment: 'lib/server: db, lib/schema, cores',
      severity: 'error',
      from: { path: '^lib/server/' },
      to: { path: ['^(app|components|worker)/', '^lib/(field|live)/'] },
    },
    {
      name: 'server-without-next',
      comment: 'next and react in one file of lib/server',
      severity: 'error',
      from: { path: '^lib/server/', pathNot: NEXT_SESSION },
      to: { path: SCREEN },
    },
    {
      name: 'components',
      comment: 'components: cores, lib/schema, lib/live; what a role may do arrives as data',
      severity: 'error',
      from: { path: '^components/' },
      to: {
        path: [
          '^(app|db|worker)/',
          '^lib/(server|field)/',
          packages('pg', 'drizzle-orm', 'better-auth/(?!dist/client|client)'),
        ],
      },
    },
    {
      name: 'components-without-node',
      severity: 'error',
      from: { path: '^components/' },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'app',
      comment: 'app never sees the worker',
      severity: 'error',
      from: { path: '^(app/|proxy\\.ts|instrumentation\\.ts)' },
      to: { path: '^worker/' },
    },
    {
      name: 'worker',
      comment: 'worker: all but components and app; never react, next',
      severity: 'error',
      from: { path: '^worker/' },
      to: { path: ['^(app|components)/', SCREEN] },
    },
    {
      name: 'worker-never-reaches-next',
      comment: 'not by way of lib/server either',
      severity: 'error',
      from: { path: '^worker/' },
      to: { path: NEXT_SESSION, reachable: true },
    },
    only(
      'yard',
      'the yard is a stranger that knows only the wire',
      '^worker/yard/',
      ['^worker/yard/', ...['field', 'physics', 'units'].map(core), packages('ws', 'zod')],
      NODE,
    ),
    {
      name: 'yard-is-a-process',
      comment: 'only the demo history may use the yard’s world',
      severity: 'error',
      from: {
        path: '^(worker|lib|db|app|components)/',
        pathNot: '^worker/yard/|^worker/jobs/demo-history\\.ts$',
      },
      to: { path: '^worker/yard/' },
    },
    {
      name: 'demo-history-only-world',
      comment: 'what the world is, what its sensors show, and where it is kept; never the node or its line',
      severity: 'error',
      from: { path: '^worker/jobs/demo-history\\.ts$' },
      to: { path: '^worker/yard/', pathNot: '^worker/yard/(world|sensors|store)\\.ts$' },
    },
    only(
      'door',
      'the door: Node, what carries requests (http-proxy-3), what sends files (sirv), itself',
      '^worker/door/',
      ['^worker/door/', packages('http-proxy-3', 'sirv')],
      NODE,
    ),
    {
      name: 'door-is-a-process',
      severity: 'error',
      from: { path: '^(worker|lib|db|app|components)/', pathNot: '^worker/door/' },
      to: { path: '^worker/door/' },
    },
    {
      name: 'nobody-imports-these',
      severity: 'error',
      from: { path: '^(app|components|db|lib|worker)/' },
      to: { path: '^(tests|scripts)/' },
    },
    {
      name: 'drizzle-in-db',
      comment: 'SQL only in db',
      severity: 'error',
      from: { path: '^(app|components|lib|worker)/' },
      to: { path: packages('drizzle-orm') },
    },
  ],
  options: {
    tsPreCompilationDeps: true, // type imports count
    tsConfig: { fileName: 'tsconfig.json' },
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '\\.(css|woff2)$' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.d.ts', '.js', '.mjs', '.json'],
    },
  },
};
