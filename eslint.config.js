import js from '@eslint/js';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

/** Reasons stand beside every rule that differs from the recommended sets. */
export default tseslint.config(
  { ignores: ['**/dist/', '**/coverage/', '**/test-results/', '**/playwright-report/', 'data/'] },
  js.configs.recommended,
  tseslint.configs.recommendedTypeChecked,
  {
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      'max-lines': ['error', { max: 400 }],
      eqeqeq: 'error',
      'prefer-const': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      // The compiler reports unused names; one report is enough.
      '@typescript-eslint/no-unused-vars': 'off',
      // Numbers and booleans read well in a template; objects do not.
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true, allowBoolean: true }],
      // An event handler may be asynchronous; its rejection reaches the global handler.
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
    },
  },
  {
    files: ['engine/src/**', 'engine/worker/**', 'studio/src/**', 'server/src/**'],
    rules: { 'no-console': 'error' },
  },
  {
    files: ['engine/src/**'],
    ignores: ['**/*.test.ts'],
    rules: {
      // Same input, same bytes.
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Take a seeded source of numbers as an argument.' },
        { object: 'Date', property: 'now', message: 'The engine has no clock.' },
      ],
      'no-restricted-globals': ['error', { name: 'Date', message: 'The engine has no clock.' }],
    },
  },
  { files: ['studio/**/*.{ts,tsx}'], extends: [reactHooks.configs.flat.recommended] },
  {
    // Playwright fixtures have a parameter called `use`, which is no hook.
    files: ['studio/e2e/**'],
    rules: { 'react-hooks/rules-of-hooks': 'off' },
  },
  {
    files: ['**/*.test.{ts,tsx}'],
    rules: {
      // Answers of a parsed JSON body are looked at with matchers, not typed.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
    },
  },
  {
    files: ['**/*.{js,mjs,cjs}'],
    extends: [tseslint.configs.disableTypeChecked],
    languageOptions: {
      globals: { process: 'readonly', console: 'readonly', module: 'writable', URL: 'readonly' },
    },
  },
);
