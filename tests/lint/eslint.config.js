// Lint rules. Passed with -c, so that paths are counted from the folder in which eslint runs: the project.
import js from '@eslint/js';
import vitest from '@vitest/eslint-plugin';
import prettier from 'eslint-config-prettier';
import { createNodeResolver, importX } from 'eslint-plugin-import-x';
import lit from 'eslint-plugin-lit';
import litA11y from 'eslint-plugin-lit-a11y';
import wc from 'eslint-plugin-wc';
import tseslint from 'typescript-eslint';

const root = new URL('../..', import.meta.url).pathname;

// What each part of sim/ may import besides itself. A part that is not listed here is refused by tests/lint.
const arrows = {
  'errors.ts': [],
  units: ['errors.ts'],
  'units.ts': ['units', 'errors.ts'],
  numerics: ['errors.ts'],
};
arrows.properties = ['numerics', 'units.ts', 'errors.ts'];
arrows.transfer = ['properties', ...arrows.properties];
arrows.control = ['properties', ...arrows.properties];
arrows.case = ['control', 'transfer', ...arrows.transfer];
arrows.column = ['case', ...arrows.case];
arrows.run = ['column', ...arrows.column];
arrows['index.ts'] = ['run', ...arrows.run];
arrows.cli = ['index.ts', ...arrows['index.ts']];

const zones = [
  ...Object.entries(arrows).map(([part, allowed]) => ({
    target: `./sim/${part}`,
    from: './sim',
    except: [part, ...allowed].map((name) => `./${name}`),
    message: `sim/${part} may import ${allowed.join(', ') || 'nothing of sim/'}.`,
  })),
  { target: './sim', from: ['./ui', './tests'], message: 'sim/ knows neither its screens nor its tests.' },
  { target: './ui', from: './tests', message: 'ui/ does not know its tests.' },
  { target: './ui', from: './sim', except: ['./index.ts'], message: 'ui/ sees of sim/ only index.ts.' },
  { target: './ui/elements', from: './sim', message: 'Elements reach the simulator through ui/store.' },
  { target: './ui/elements', from: './ui/worker', message: 'Elements reach the simulator through ui/store.' },
];

export default tseslint.config(
  { ignores: ['dist/', 'coverage/', 'node_modules/'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  {
    files: ['**/*.ts'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: root } },
    rules: {
      // Numbers in messages are fine; objects and undefined are not.
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': 'error',
    },
  },
  {
    plugins: { 'import-x': importX },
    settings: {
      // Said outright rather than left to defaults: a wrong one lets the cycle rule find nothing, without a word.
      'import-x/resolver-next': [createNodeResolver({ extensions: ['.ts', '.js', '.json'] })],
      'import-x/extensions': ['.ts', '.js'],
      'import-x/parsers': { '@typescript-eslint/parser': ['.ts'] },
    },
    rules: {
      eqeqeq: 'error',
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx'] }],
      'import-x/extensions': ['error', 'ignorePackages', { checkTypeImports: true }],
      'import-x/no-cycle': 'error',
      'import-x/no-duplicates': 'error',
      'import-x/no-restricted-paths': ['error', { basePath: root, zones }],
      'import-x/no-self-import': 'error',
      'import-x/no-unresolved': 'error',
    },
  },
  {
    // Only the command line, the tests and the build files know the machine they run on.
    files: ['sim/**/*.ts', 'ui/**/*.ts'],
    ignores: ['sim/cli/**'],
    rules: { 'import-x/no-nodejs-modules': 'error' },
  },
  {
    // Without noUncheckedIndexedAccess the rule takes every index for a hit and asks to drop the checks.
    files: ['sim/**/*.ts'],
    rules: { '@typescript-eslint/no-unnecessary-condition': 'off' },
  },
  {
    files: ['sim/**/*.ts'],
    ignores: ['sim/cli/**'],
    rules: {
      'no-restricted-globals': [
        'error',
        ...['Date', 'performance', 'setTimeout', 'setInterval', 'queueMicrotask'].map((name) => ({
          name,
          message: 'sim/ has no clock: the same case gives the same bytes.',
        })),
        ...['crypto'].map((name) => ({ name, message: 'sim/ has no randomness of its own.' })),
        ...['process', 'Buffer', 'console', 'window', 'document', 'self', 'globalThis'].map((name) => ({
          name,
          message: 'sim/ runs in Node and in a worker and knows neither.',
        })),
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'sim/ has no randomness of its own.' },
      ],
    },
  },
  {
    files: ['ui/**/*.ts'],
    extends: [lit.configs['flat/recommended'], wc.configs['flat/best-practice']],
    plugins: { 'lit-a11y': litA11y },
    rules: litA11y.configs.recommended.rules,
  },
  {
    files: ['tests/**/*.ts'],
    extends: [vitest.configs.recommended],
    rules: {
      'vitest/expect-expect': ['error', { assertFunctionNames: ['expect*', 'fc.assert'] }],
      // In a test a wrong `!` makes the test fail, and indexing numbers stays readable.
      '@typescript-eslint/no-non-null-assertion': 'off',
      'vitest/no-disabled-tests': 'error',
      'vitest/no-focused-tests': 'error',
    },
  },
  {
    files: ['**/*.js'],
    languageOptions: { globals: { process: 'readonly', URL: 'readonly' } },
  },
  prettier,
);
