import angular from 'angular-eslint';
import prettier from 'eslint-config-prettier';
import boundaries from 'eslint-plugin-boundaries';
import tsdoc from 'eslint-plugin-tsdoc';
import tseslint from 'typescript-eslint';

// First match wins, so a nested folder comes before the folder that holds it.
const elements = [
  ['contracts', 'shared/contracts'],
  ['domain', 'shared'],
  ['client-core', 'src/app/core'],
  ['client-ui', 'src/app/ui'],
  ['client-feature', 'src/app/*', ['feature']],
  ['client-shell', 'src'],
  ['server', 'server'],
  ['simulator', 'simulator'],
  ['test', 'test'],
].map(([type, pattern, capture]) => ({ type, pattern, capture, partialMatch: false }));

const allow = (from, ...to) => ({
  from: { element: { type: from } },
  allow: { to: to.map((t) => ({ element: typeof t === 'string' ? { type: t } : t })) },
});

const sources = '{src,server,shared,simulator,test}/**/*.ts';
const specs = '**/*.spec.ts';

export default [
  { ignores: ['dist/**', '.data/**', '.angular/**', 'node_modules/**'] },
  {
    files: [sources],
    languageOptions: { parser: tseslint.parser },
    plugins: { boundaries },
    settings: {
      'import/resolver': { typescript: { alwaysTryTypes: true, project: ['tsconfig.json'] } },
      'boundaries/elements': elements,
    },
    rules: {
      'boundaries/no-unknown-files': 'error',
      'boundaries/dependencies': [
        'error',
        {
          default: 'disallow',
          policies: [
            allow('domain', 'domain'),
            allow('contracts', 'contracts', 'domain'),
            allow('client-core', 'client-core', 'contracts', 'domain'),
            allow('client-ui', 'client-ui', 'domain'),
            allow('client-feature', 'client-core', 'client-ui', 'contracts', 'domain', {
              type: 'client-feature',
              captured: { feature: '{{ from.element.captured.feature }}' },
            }),
            allow(
              'client-shell',
              'client-shell',
              'client-core',
              'client-ui',
              'client-feature',
              'contracts',
              'domain',
            ),
            allow('server', 'server', 'contracts', 'domain'),
            allow('simulator', 'simulator', 'contracts', 'domain'),
            allow('test', '*'),
          ],
        },
      ],
    },
  },
  {
    // Correctness that needs types. Zero is a measurement, so numbers are never tested for truthiness.
    files: [sources],
    languageOptions: {
      parser: tseslint.parser,
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    plugins: { '@typescript-eslint': tseslint.plugin, tsdoc },
    rules: {
      '@typescript-eslint/strict-boolean-expressions': [
        'error',
        { allowNumber: false, allowNullableNumber: false },
      ],
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      'tsdoc/syntax': 'error',
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    // Domain code is pure: relative imports only, no clock, no randomness, no process.
    files: ['shared/**/*.ts'],
    ignores: ['shared/contracts/**', specs],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex: '^(?!\\.|simple-statistics|luxon|rrule|csv-parse|iconv-lite)',
              message:
                'shared/ domain code imports only simple-statistics, luxon, rrule, csv-parse and iconv-lite.',
            },
          ],
        },
      ],
      'no-restricted-globals': ['error', 'process', 'window', 'fetch', 'setTimeout'],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now' },
        { object: 'Math', property: 'random' },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'Pass the instant in.',
        },
      ],
    },
  },
  {
    // The database stays below the store; the web framework stays above the service.
    files: ['server/**/*-service.ts'],
    rules: { 'no-restricted-imports': ['error', { paths: ['express', 'typeorm', 'socket.io', 'pg'] }] },
  },
  {
    files: ['server/**/*-routes.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        { paths: ['typeorm', 'pg'], patterns: ['**/*-store', '**/*-entity'] },
      ],
    },
  },
  ...angular.configs.templateRecommended.map((config) => ({ ...config, files: ['src/**/*.html'] })),
  ...angular.configs.templateAccessibility.map((config) => ({ ...config, files: ['src/**/*.html'] })),
  { files: ['src/**/*.html'], rules: { '@angular-eslint/template/prefer-control-flow': 'error' } },
  prettier,
];
