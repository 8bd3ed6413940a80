import js from '@eslint/js';
import globals from 'globals';
import reactHooks from 'eslint-plugin-react-hooks';
import reactRefresh from 'eslint-plugin-react-refresh';
import { defineConfig, globalIgnores } from 'eslint/config';
import tseslint from 'typescript-eslint';

/** The kernels are pure functions: seed, clock and log are handed in by the two worker adapters. */
const kernels = ['shared/numerics/**', 'shared/frame/**', 'shared/analysis/**'];

export default defineConfig(
  globalIgnores([
    'dist',
    'coverage',
    'node_modules',
    '.ringstead',
    'test-results',
    'playwright-report',
    'shared/numerics/kernels/kernels.generated.ts',
    // AssemblyScript: its own types, checked by its own compiler.
    'shared/numerics/kernels/assembly',
  ]),
  js.configs.recommended,
  {
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      eqeqeq: 'error',
      'no-console': 'error',
      'object-shorthand': 'error',
      'prefer-const': 'error',
    },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/ban-ts-comment': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-misused-promises': [
        'error',
        { checksVoidReturn: { attributes: false } },
      ],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unnecessary-type-arguments': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/only-throw-error': 'error',
      '@typescript-eslint/prefer-nullish-coalescing': 'error',
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
    },
  },
  {
    // Indexing a typed array inside a proven bound reads `a[i]!`; a check in an inner loop would cost.
    files: ['shared/**', 'src/viewer/**', 'src/workers/**', 'tests/**'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    files: kernels,
    rules: {
      'no-restricted-globals': [
        'error',
        { name: 'Date', message: 'Kernels have no clock: hand in elapsed time or a callback.' },
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Kernels are seeded: hand in the seed.' },
      ],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat.recommended, reactRefresh.configs.vite],
    languageOptions: { globals: globals.browser },
    // Warns where the React Compiler would skip a component; this project does not use the compiler.
    rules: { 'react-hooks/incompatible-library': 'off' },
  },
  {
    files: ['**/*.{mjs,cjs}', 'scripts/**', '*.config.{js,ts}'],
    languageOptions: { globals: globals.node },
  },
  {
    // These talk to a person at a terminal.
    files: ['scripts/**', 'tests/bench/**'],
    rules: { 'no-console': 'off' },
  },
);
