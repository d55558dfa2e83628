// Four projects: pure code, the server with its real PostgreSQL, Angular, and journeys in Chromium.
const swc = [
  '@swc/jest',
  {
    sourceMaps: 'inline',
    module: { type: 'commonjs' },
    jsc: {
      target: 'es2022',
      parser: { syntax: 'typescript', decorators: true },
      transform: { legacyDecorator: true, decoratorMetadata: true },
    },
  },
];

// Angular's own compiler, transpiling only: the sources are type-checked by tsc.
const angular = [
  'jest-preset-angular',
  {
    tsconfig: '<rootDir>/src/tsconfig.spec.json',
    stringifyContentPathRegex: '\\.(html|svg)$',
  },
];

const node = {
  testEnvironment: 'node',
  transform: { '^.+\\.ts$': swc },
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/shared/$1' },
  modulePathIgnorePatterns: ['<rootDir>/dist/', '<rootDir>/.data/'],
};

module.exports = {
  testTimeout: 120_000, // Real databases and browsers; no test asserts a time.
  workerIdleMemoryLimit: '1GB',
  maxWorkers: '100%', // One fewer by default, which is one alone on two cores.
  projects: [
    {
      ...node,
      displayName: 'shared',
      testMatch: ['<rootDir>/shared/**/*.spec.ts', '<rootDir>/test/{logger-files,reference}/**/*.spec.ts'],
    },
    {
      ...node,
      displayName: 'server',
      testMatch: [
        '<rootDir>/server/**/*.spec.ts',
        '<rootDir>/simulator/**/*.spec.ts',
        '<rootDir>/test/{api,database,faults,readings,scripts}/**/*.spec.ts',
      ],
    },
    {
      displayName: 'web',
      preset: 'jest-preset-angular',
      testMatch: ['<rootDir>/src/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/src/testing/setup.ts'],
      transform: { '^.+\\.(ts|js|mjs|html|svg)$': angular },
      // ECharts and its renderer ship modules only.
      transformIgnorePatterns: [
        'node_modules/(?!(.*\\.mjs$|@angular/common/locales/.*\\.js$|echarts/|zrender/))',
      ],
      moduleNameMapper: {
        // jsdom has no canvas.
        '/echarts-parts$': '<rootDir>/src/testing/echarts-parts.ts',
        '^@shared/(.*)$': '<rootDir>/shared/$1',
      },
      modulePathIgnorePatterns: ['<rootDir>/dist/', '<rootDir>/.data/'],
    },
    {
      ...node,
      displayName: 'e2e',
      testMatch: ['<rootDir>/test/{e2e,production}/**/*.spec.ts'],
    },
  ],
};
