import js from '@eslint/js';
import globals from 'globals';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

/** Who may import whom (DEVELOPERS.md). The regex form is used since a pattern that starts with # is a comment. */
function forbid(regex, message) {
  return { 'no-restricted-imports': ['error', { patterns: [{ regex, message }] }] };
}

export default tseslint.config(
  { ignores: ['node_modules', 'dist', 'data', 'test-results', 'playwright-report'] },
  js.configs.recommended,
  tseslint.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    languageOptions: {
      globals: { ...globals.node, ...globals.browser },
      parserOptions: { project: './tsconfig.json', tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-misused-promises': [
        'error',
        { checksVoidReturn: { arguments: false, attributes: false } },
      ],
      '@typescript-eslint/no-explicit-any': 'error',
      'no-console': 'error',
    },
  },
  { files: ['**/*.{js,mjs}'], languageOptions: { globals: globals.node } },
  {
    files: ['server/commands/**', 'tests/bench/**', 'tests/run.mjs'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['client/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks, 'jsx-a11y': jsxA11y },
    rules: { ...reactHooks.configs.recommended.rules, ...jsxA11y.configs.recommended.rules },
  },
  {
    files: ['shared/**'],
    rules: {
      ...forbid(
        '^(#|(\\.\\./)+)(client|server)/|^(react|express|knex|node:)',
        'shared is pure: it imports nothing from client, server or node',
      ),
      'no-restricted-globals': ['error', 'fetch', 'process', 'window', 'document'],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'time comes in as an argument' },
        { object: 'Math', property: 'random', message: 'seeds come in as arguments' },
      ],
    },
  },
  {
    files: ['shared/analysis/**'],
    rules: forbid(
      '^zod$|^(#|(\\.\\./)+)(client|server|shared/schemas|shared/reading)/|^\\.\\./(schemas|reading)/|^node:',
      'analysis imports nothing but analysis and units',
    ),
  },
  {
    files: ['client/**'],
    rules: forbid('^(#|(\\.\\./)+)(server|migrations|tests)/', 'client and server meet over HTTP'),
  },
  {
    files: ['client/components/**', 'client/chart/**'],
    rules: forbid(
      '^(#|(\\.\\./)+)(server|migrations|tests)/|/(api|pages)/',
      'components and chart fetch nothing and know no page',
    ),
  },
  {
    files: ['server/**'],
    rules: forbid('^(#|(\\.\\./)+)(client|tests)/', 'client and server meet over HTTP'),
  },
);
