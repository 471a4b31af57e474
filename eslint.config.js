import js from '@eslint/js';
import jsdoc from 'eslint-plugin-jsdoc';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

export default tseslint.config(
  { ignores: ['dist/', 'data/', 'coverage/', 'node_modules/', 'tests/tooling/fixtures/'] },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      // Numbers in texts are read by people; anything else in a template is a mistake.
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      // A promise from an event handler of React is nobody's to await.
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      // Readers and row types name what they return where they are called.
      '@typescript-eslint/no-unnecessary-type-parameters': 'off',
      // Most of what is taken apart here are plain objects of functions, not classes.
      '@typescript-eslint/unbound-method': 'off',
      'no-console': 'error',
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    languageOptions: { globals: globals.browser },
    rules: { ...reactHooks.configs.recommended.rules },
  },
  {
    files: ['shared/**/*.ts'],
    plugins: { jsdoc },
    rules: {
      'jsdoc/require-jsdoc': [
        'error',
        {
          publicOnly: true,
          minLineCount: 2,
          require: { FunctionDeclaration: true, ArrowFunctionExpression: true },
        },
      ],
      'jsdoc/require-description': 'error',
    },
  },
  {
    // Indexes into lists that the code itself built a line before.
    files: ['shared/{frames,split,hanging,materials}/**/*.ts'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    // What talks to the person at the console.
    files: ['server/main.ts', 'server/cli/**/*.ts', 'tests/bench/**/*.ts'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['src/app/error-boundary.tsx'],
    rules: { 'no-console': ['error', { allow: ['error'] }] },
  },
  {
    files: ['public/**/*.js'],
    languageOptions: { globals: globals.browser },
  },
  {
    files: ['*.{js,cjs}', '.*.cjs'],
    languageOptions: { globals: globals.node },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      // Replies of a test are looked at field by field.
      '@typescript-eslint/no-non-null-assertion': 'off',
      '@typescript-eslint/unbound-method': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
    },
  },
);
