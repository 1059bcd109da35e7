import tseslint from 'typescript-eslint';

export default tseslint.config(
  { ignores: ['node_modules', '.next', '.build', '.data*', 'next-env.d.ts', 'db/migrations'] },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      eqeqeq: 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-import-type-side-effects': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      // a number or a null in a template is written as meant: `port ${port}`
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
      // `() => setTimeout(...)` as a callback says what it does; what matters is that no promise is lost, which is its own rule
      '@typescript-eslint/no-confusing-void-expression': 'off',
      // header and environment records are meant to lose keys by name
      '@typescript-eslint/no-dynamic-delete': 'off',
      // React's and Next's types hand over functions that are promises where void is expected (an event's handler)
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      'no-restricted-syntax': [
        'error',
        { selector: 'TSEnumDeclaration', message: 'A union of strings does the same and needs no code.' },
        { selector: 'ExportAllDeclaration', message: 'No barrels: import from the file that has it.' },
      ],
    },
  },
  {
    files: ['**/*.{mjs,cjs}'],
    rules: { 'no-unused-vars': 'error', 'prefer-const': 'error', 'no-var': 'error', eqeqeq: 'error' },
  },
  {
    // a test reads what it has just made; the checks that matter there are on the promises
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
    },
  },
);
