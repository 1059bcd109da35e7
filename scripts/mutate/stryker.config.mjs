/** Changes lib/control one spot at a time and sees whether a test notices. `npm run mutate [-- file …]`; not in CI. */
export default {
  testRunner: 'vitest',
  vitest: { configFile: 'scripts/mutate/vitest.config.mjs', related: false },
  plugins: ['@stryker-mutator/vitest-runner'],
  coverageAnalysis: 'perTest',
  ignoreStatic: true,
  mutate: ['lib/control/**/*.ts'],
  ignorePatterns: ['*', '!lib/**', '!tests/**', '!scripts/**', '!package.json', '!tsconfig.json'],
  // a word in a reason is wording's business; what decides is arithmetic, comparison and branch
  mutator: { excludedMutations: ['StringLiteral'] },
  concurrency: 1,
  tempDirName: '.build/mutate',
  reporters: ['clear-text'],
  clearTextReporter: { allowColor: false, reportTests: false, logTests: false },
  allowEmpty: true,
};
