import nextVitals from 'eslint-config-next/core-web-vitals';
import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import importX from 'eslint-plugin-import-x';
import jsdoc from 'eslint-plugin-jsdoc';
import tseslint from 'typescript-eslint';

/** What each layer may not import, low to high. The table in DEVELOPERS.md is the same table. */
const layers = {
  solver: ['app', 'components', 'lib', 'db', 'tests', 'scripts'],
  'lib/domain': ['app', 'components', 'lib/!(domain)', 'db', 'solver', 'tests', 'scripts'],
  'lib/checks': ['app', 'components', 'lib/server', 'lib/analysis', 'db', 'tests', 'scripts'],
  'lib/hand-methods': ['app', 'components', 'lib/!(domain|hand-methods)', 'db', 'solver', 'tests', 'scripts'],
  'lib/format': ['app', 'components', 'lib/!(domain|format)', 'db', 'solver', 'tests', 'scripts'],
  'lib/*.ts': ['app', 'components', 'lib/*/**', 'db', 'solver', 'tests', 'scripts'],
  'lib/analysis': ['app', 'components', 'lib/server', 'db', 'tests', 'scripts'],
  db: ['app', 'components', 'lib/server', 'lib/analysis', 'lib/checks', 'solver', 'tests'],
  'lib/server': ['app', 'components', 'tests'],
  'lib/auth': ['app', 'components', 'lib/analysis', 'lib/checks', 'solver', 'tests'],
  'components/ui': ['app', 'components/!(ui)', 'lib/!(cn*)', 'db', 'solver', 'tests'],
  'components/editor/kernels': [
    'app',
    'components/!(editor)',
    'components/editor/!(kernels)',
    'lib/!(domain)',
    'db',
    'tests',
  ],
  components: ['app', 'lib/server', 'lib/auth', 'db', 'tests', 'scripts'],
  app: ['db', 'tests', 'scripts'],
};

const zones = Object.entries(layers).flatMap(([layer, forbidden]) =>
  forbidden
    .flatMap((path) => [`./${path}`, `./${path}/**/*`])
    .map((from) => ({
      target: layer.endsWith('.ts') ? `./${layer}` : `./${layer}/**/*`,
      from, // once for files, once for what lies under folders
      message: `Not from ${layer}/ (DEVELOPERS.md, "Import directions").`,
    })),
);

/** What others call is documented in full; a function of one file may say why it is in a line. */
const exported = ['ExportNamedDeclaration > FunctionDeclaration'];

const host = [
  'window',
  'document',
  'self',
  'navigator',
  'process',
  'Buffer',
  'performance',
  'fetch',
  'setTimeout',
  'setInterval',
];

export default tseslint.config(
  {
    ignores: [
      'node_modules',
      '.next',
      '.data',
      'dist',
      'db/migrations',
      'next-env.d.ts',
      'test-results',
      'playwright-report',
    ],
  },
  ...nextVitals,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.base],
    plugins: { 'import-x': importX },
    settings: {
      ...importX.flatConfigs.typescript.settings, // without it no-cycle sees nothing in .ts files
      'import-x/resolver-next': [createTypeScriptImportResolver({ project: './tsconfig.json' })],
    },
    rules: {
      'import-x/no-restricted-paths': ['error', { zones }],
      'import-x/no-cycle': 'error',
      'import-x/no-default-export': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
      'max-lines-per-function': ['error', { max: 80, skipBlankLines: true, skipComments: true }],
      'max-params': ['error', 6],
    },
  },
  {
    // A test file's describe block and a component's markup are long without being complex.
    files: ['**/*.test.{ts,tsx}', 'tests/**/*.ts', '**/*.tsx'],
    rules: { 'max-lines-per-function': ['error', { max: 200, skipBlankLines: true, skipComments: true }] },
  },
  {
    // Next.js and the tools ask for default exports in these files only.
    files: [
      'app/**/{page,layout,template,loading,error,not-found,global-error,default}.tsx',
      'app/{robots,sitemap,manifest}.ts',
      '*.config.{ts,mjs}',
      '**/*.d.ts',
      'tests/integration/global-setup.ts',
    ],
    rules: { 'import-x/no-default-export': 'off', 'import/no-anonymous-default-export': 'off' },
  },
  {
    files: ['{app,components,lib,db,scripts}/**/*.{ts,tsx}'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            { group: ['@/solver/*', '!@/solver/hosts'], message: "Import the solver from '@/solver'." },
          ],
        },
      ],
    },
  },
  {
    // lucia stays behind lib/auth, so that it can be replaced.
    files: ['{app,components,db,scripts}/**/*.{ts,tsx}', 'lib/!(auth)/**/*.ts'],
    ignores: ['lib/auth/**'],
    rules: {
      '@typescript-eslint/no-restricted-imports': [
        'error',
        {
          paths: ['lucia', '@lucia-auth/adapter-drizzle'].map((name) => ({
            name,
            message: 'Only lib/auth knows lucia.',
          })),
        },
      ],
    },
  },
  {
    // The solver core and the domain know no host: no DOM, no Node, no clock, no chance.
    files: [
      'solver/**/*.ts',
      'lib/{domain,checks,hand-methods}/**/*.ts',
      'components/editor/kernels/**/*.ts',
    ],
    ignores: ['solver/hosts/**', '**/*.test.ts'],
    plugins: { jsdoc },
    settings: { jsdoc: { mode: 'typescript' } },
    rules: {
      'no-console': 'error',
      'no-restricted-globals': ['error', ...host],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random' },
        { object: 'Date', property: 'now' },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: "ThrowStatement > NewExpression[callee.name='Error']",
          message: 'Throw a coded error (errors.ts), not a bare Error.',
        },
      ],
      'jsdoc/require-jsdoc': [
        'error',
        { publicOnly: true, require: { FunctionDeclaration: true, ClassDeclaration: true } },
      ],
      'jsdoc/require-param': ['error', { checkDestructured: false, contexts: exported }],
      'jsdoc/check-param-names': ['error', { checkDestructured: false }],
      'jsdoc/require-returns': ['error', { contexts: exported }],
      'jsdoc/no-types': 'error',
      'jsdoc/check-tag-names': ['error', { definedTags: ['source', 'pre', 'remarks'] }],
    },
  },
  {
    files: ['solver/**/*.ts'],
    ignores: ['solver/hosts/**', '**/*.test.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              group: ['node:*', 'react', 'react-dom', 'next', 'next/*', 'zod', '@/*'],
              message: 'solver/ imports only itself.',
            },
          ],
        },
      ],
    },
  },
);
