import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

/**
 * Walls between the rooms: shared ← server, shared ← src; never server ↔ src. A later block replaces an earlier
 * one's rule, so each room lists all of its walls at once.
 */
const walls = (...patterns) => ({ 'no-restricted-imports': ['error', { patterns }] });
const NO_APP = {
  group: ['**/src/**', '**/app/**', '@angular/*'],
  message: 'Only the browser application imports itself.',
};
const NO_SERVER = { group: ['**/server/**'], message: 'Only the server imports the server.' };
const NO_KNEX = { group: ['knex'], message: 'Only server/db holds Knex.', allowTypeImports: true };
const NO_CONTRACTS = { group: ['**/contracts/**'], message: 'The domain never imports contracts.' };
const NO_FEATURES = { group: ['**/features/**'], message: 'core and ui know no feature.' };
/** shared/ runs anywhere; of packages it takes only these. */
const ONLY_PURE = {
  regex: '^(?!\\.|zod/mini$|zod/v4/core$|@stdlib/stats-base-dists-t-quantile$)',
  message: 'shared/ imports only pure packages that are listed in eslint.config.js.',
};

export default tseslint.config(
  {
    ignores: [
      'dist/',
      'node_modules/',
      '.angular/',
      'data/',
      'shots/',
      'coverage/',
      'test-results/',
      'playwright-report/',
    ],
  },
  {
    files: ['**/*.ts'],
    extends: [...tseslint.configs.recommended],
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      eqeqeq: ['error', 'always'],
      'no-console': 'error',
    },
  },
  {
    files: ['server/**/*.ts', 'shared/**/*.ts', 'migrations/**/*.ts', 'seeds/**/*.ts'],
    extends: [...tseslint.configs.recommendedTypeCheckedOnly],
    languageOptions: { parserOptions: { project: './server/tsconfig.json' } },
    rules: {
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: false }],
      // casts to a library's looser type read as documentation; the compiler decides what is needed
      '@typescript-eslint/no-unnecessary-type-assertion': 'off',
    },
  },
  { files: ['server/**/*.ts', 'migrations/**/*.ts', 'seeds/**/*.ts'], rules: walls(NO_APP, NO_KNEX) },
  { files: ['server/db/**/*.ts', 'migrations/**/*.ts'], rules: walls(NO_APP) },
  { files: ['shared/**/*.ts'], rules: walls(NO_APP, NO_SERVER, NO_CONTRACTS, ONLY_PURE) },
  { files: ['shared/contracts/**/*.ts'], rules: walls(NO_APP, NO_SERVER, ONLY_PURE) },
  {
    files: ['src/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      ...walls(NO_SERVER),
      '@angular-eslint/component-selector': ['error', { type: 'element', prefix: 'app', style: 'kebab-case' }],
      '@angular-eslint/directive-selector': ['error', { type: 'attribute', prefix: 'app', style: 'camelCase' }],
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
    },
  },
  {
    files: ['src/app/core/**/*.ts', 'src/app/ui/**/*.ts'],
    rules: walls(NO_SERVER, NO_FEATURES),
  },
  {
    files: ['src/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
  },
);
