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

const node = {
  testEnvironment: 'node',
  transform: { '^.+\\.ts$': swc },
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/shared/$1' },
  modulePathIgnorePatterns: ['<rootDir>/dist/', '<rootDir>/.data/'],
};

module.exports = {
  projects: [
    {
      ...node,
      displayName: 'shared',
      testMatch: ['<rootDir>/shared/**/*.spec.ts', '<rootDir>/test/reference/**/*.spec.ts'],
    },
    {
      ...node,
      displayName: 'server',
      testMatch: [
        '<rootDir>/server/**/*.spec.ts',
        '<rootDir>/simulator/**/*.spec.ts',
        '<rootDir>/test/api/**/*.spec.ts',
        '<rootDir>/test/database/**/*.spec.ts',
        '<rootDir>/test/scripts/**/*.spec.ts',
      ],
    },
    {
      ...node,
      displayName: 'e2e',
      testMatch: ['<rootDir>/test/e2e/**/*.spec.ts'],
    },
  ],
};
