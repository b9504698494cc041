import js from '@eslint/js';
import angular from 'angular-eslint';
import prettier from 'eslint-config-prettier';
import tseslint from 'typescript-eslint';

/** What the scripts that run without a build use of Node. */
const NODE = [
  'process',
  'console',
  'Buffer',
  'URL',
  'setTimeout',
  'clearTimeout',
  'fetch',
  'performance',
];

/** Only what formats, types and tidy tests do not already find. */
export default tseslint.config(
  {
    ignores: [
      '**/node_modules/**',
      'dist/**',
      '.angular/**',
      '.data/**',
      'coverage/**',
      'server/generated/**',
      'apps/web/src/app/graphql/generated/**',
      'drizzle/migrations/**',
    ],
  },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  {
    files: ['**/*.{ts,mjs,js}'],
    extends: [js.configs.recommended, ...tseslint.configs.recommended, prettier],
    rules: {
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': 'off',
      'no-restricted-syntax': [
        'error',
        {
          selector:
            'ImportDeclaration[source.value=/^zod/] > :matches(ImportSpecifier[imported.name="z"], ImportDefaultSpecifier)',
          message:
            "Write import * as z from 'zod': the named import brings all of zod into the app.",
        },
      ],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_' },
      ],
      '@typescript-eslint/switch-exhaustiveness-check': 'off',
    },
  },
  {
    files: ['**/*.{mjs,js}'],
    languageOptions: { globals: Object.fromEntries(NODE.map((name) => [name, 'readonly'])) },
  },
  {
    // These need the types, which cost most of the time; a promise that nobody waits for is worth it where data is written.
    files: ['server/**/*.ts', 'shared/**/*.ts'],
    languageOptions: {
      parserOptions: {
        project: ['server/tsconfig.json'],
        tsconfigRootDir: new URL('..', import.meta.url).pathname,
      },
    },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
    },
  },
  {
    files: ['apps/web/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'app', style: 'camelCase' },
      ],
      '@angular-eslint/component-selector': [
        'error',
        { type: 'element', prefix: 'app', style: 'kebab-case' },
      ],
    },
  },
  {
    // Hosts that a spec makes up show nothing that could be drawn too often.
    files: ['apps/web/**/*.spec.ts'],
    rules: { '@angular-eslint/prefer-on-push-component-change-detection': 'off' },
  },
  {
    files: ['apps/web/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
  },
);
