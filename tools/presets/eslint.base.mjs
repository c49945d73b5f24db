import js from '@eslint/js';
import nx from '@nx/eslint-plugin';
import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

const any = ['platform:any'];
const node = ['platform:any', 'platform:node'];
const web = ['platform:any', 'platform:web'];
const framework = ['@angular/*', 'express', 'commander'];

/** The arrows of DEVELOPERS.md, as lint. */
const depConstraints = [
  {
    sourceTag: 'type:values',
    onlyDependOnLibsWithTags: [],
    bannedExternalImports: ['kysely', 'pg', 'exceljs', ...framework],
  },
  {
    sourceTag: 'type:rules',
    onlyDependOnLibsWithTags: ['type:values'],
    allowedExternalImports: ['fast-check'],
  },
  {
    sourceTag: 'type:contract',
    onlyDependOnLibsWithTags: ['type:values'],
    bannedExternalImports: ['kysely', 'pg', 'exceljs', 'decimal.js', ...framework],
  },
  {
    sourceTag: 'type:data',
    onlyDependOnLibsWithTags: ['type:contract', 'type:rules', 'type:values', 'type:migrations'],
    bannedExternalImports: ['decimal.js', ...framework],
  },
  {
    sourceTag: 'type:use-cases',
    onlyDependOnLibsWithTags: ['type:data', 'type:rules', 'type:contract', 'type:values'],
    bannedExternalImports: ['pg', 'exceljs', 'decimal.js', ...framework],
  },
  {
    sourceTag: 'type:ui',
    onlyDependOnLibsWithTags: ['type:contract', 'type:values', 'type:ui'],
    bannedExternalImports: ['kysely', 'pg', 'exceljs', 'decimal.js', 'express', 'commander'],
  },
  {
    sourceTag: 'type:web-app',
    onlyDependOnLibsWithTags: ['type:ui', 'type:rules', 'type:contract', 'type:values'],
    bannedExternalImports: [
      'kysely',
      'pg',
      'exceljs',
      'decimal.js',
      'express',
      'commander',
      'ag-grid*',
      'echarts*',
      'ngx-echarts',
    ],
  },
  {
    sourceTag: 'type:app',
    onlyDependOnLibsWithTags: ['type:use-cases', 'type:contract', 'type:values', 'type:tools'],
    bannedExternalImports: ['kysely', 'exceljs', 'decimal.js', '@angular/*'],
  },
  { sourceTag: 'type:migrations', onlyDependOnLibsWithTags: [], allowedExternalImports: ['kysely'] },
  {
    sourceTag: 'type:tools',
    onlyDependOnLibsWithTags: [
      'type:use-cases',
      'type:data',
      'type:contract',
      'type:rules',
      'type:values',
      'type:migrations',
    ],
  },
  { sourceTag: 'type:tests', onlyDependOnLibsWithTags: ['*'] },
  { sourceTag: 'platform:any', onlyDependOnLibsWithTags: any },
  { sourceTag: 'platform:node', onlyDependOnLibsWithTags: node },
  { sourceTag: 'platform:web', onlyDependOnLibsWithTags: web },
];

/**
 * Specs may use the test database's builders, which know every lib.
 * @param {string[]} allow imports that no arrow forbids
 */
const boundaries = (allow) => [
  'error',
  {
    enforceBuildableLibDependency: false,
    allow,
    depConstraints,
    // Specs of the libs make their shops with what the tests hold; nothing that is shipped goes that way.
    ignoredCircularDependencies: [['test-shop', '*']],
    // The command line loads it when a command needs it, and names its types before, which leave nothing behind.
    checkDynamicDependenciesExceptions: ['@brakeven/use-cases'],
  },
];

const typescript = (/** @type {string} */ dir) =>
  tseslint.config(
    { ignores: ['**/dist/**', '**/*.cjs', '**/eslint.config.mjs'] },
    js.configs.recommended,
    ...tseslint.configs.recommended,
    {
      files: ['**/*.ts', '**/*.mjs'],
      plugins: { '@nx': nx },
      languageOptions: { parserOptions: { tsconfigRootDir: dir } },
      rules: {
        '@nx/enforce-module-boundaries': boundaries([]),
        '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
        '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
        'no-nested-ternary': 'error',
        'no-console': 'error',
        eqeqeq: 'error',
        'no-restricted-properties': [
          'error',
          { object: 'it', property: 'only', message: 'Run the whole suite.' },
          { object: 'describe', property: 'only', message: 'Run the whole suite.' },
          { object: 'test', property: 'only', message: 'Run the whole suite.' },
        ],
        'no-undef': 'off',
      },
    },
    {
      files: ['**/*.spec.ts', '**/testing/*.ts'],
      rules: { '@nx/enforce-module-boundaries': boundaries(['@brakeven/test-shop']) },
    },
  );

/**
 * ESLint for Node projects and the pure libs.
 * @param {string} dir folder of the project
 */
export const nodeConfig = (dir) => typescript(dir);

/**
 * ESLint for Angular projects: the same, and angular-eslint for code and templates.
 * @param {string} dir folder of the project
 */
export const webConfig = (dir) =>
  tseslint.config(
    ...typescript(dir),
    {
      files: ['**/*.ts'],
      extends: [...angular.configs.tsRecommended],
      processor: angular.processInlineTemplates,
      rules: {
        '@angular-eslint/component-selector': [
          'error',
          { type: 'element', prefix: 'app', style: 'kebab-case' },
        ],
        '@angular-eslint/directive-selector': [
          'error',
          { type: 'attribute', prefix: 'app', style: 'camelCase' },
        ],
        '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      },
    },
    {
      files: ['**/*.html'],
      extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
    },
  );
