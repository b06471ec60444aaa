const path = require('path');

const root = path.resolve(__dirname, '..');
const alias = { '^@/(.*)$': '<rootDir>/$1' };
const swc = ['@swc/jest', {
  jsc: { target: 'es2022', parser: { syntax: 'typescript', tsx: true }, baseUrl: root, paths: { '@/*': ['./*'] } },
  module: { type: 'commonjs' },
  sourceMaps: 'inline',
}];
const babelWeb = ['babel-jest', { presets: ['babel-preset-expo'], caller: { name: 'metro', bundler: 'metro', platform: 'web' }, babelrc: false, configFile: false }];

module.exports = {
  rootDir: root,
  // A loaded machine is no failure: what takes long under load is measured by npm run bench, never by a test.
  testTimeout: 60_000,
  projects: [
    {
      displayName: 'pure', rootDir: root, testEnvironment: 'node',
      testMatch: ['<rootDir>/tests/scheduling/**/*.test.ts', '<rootDir>/tests/shared/**/*.test.ts'],
      transform: { '^.+\\.tsx?$': swc }, moduleNameMapper: alias,
      setupFiles: ['<rootDir>/tests/setup/utc.ts'],
    },
    {
      displayName: 'api', rootDir: root, testEnvironment: 'node',
      testMatch: ['<rootDir>/tests/server/**/*.test.ts'],
      transform: { '^.+\\.tsx?$': swc }, moduleNameMapper: alias,
      setupFiles: ['<rootDir>/tests/setup/utc.ts'],
      globalSetup: '<rootDir>/tests/setup/databaseUp.ts', globalTeardown: '<rootDir>/tests/setup/databaseDown.ts',
    },
    {
      displayName: 'ui', rootDir: root, preset: 'jest-expo/web',
      testMatch: ['<rootDir>/tests/components/**/*.test.{ts,tsx}'],
      transform: { '\\.[jt]sx?$': babelWeb },
      moduleNameMapper: {
        '\\.css$': '<rootDir>/tests/setup/emptyModule.js',
        // The icons' ES modules end in .mjs, which the preset does not transform.
        '^lucide-react-native/icons/(.*)$': '<rootDir>/node_modules/lucide-react-native/dist/cjs/icons/$1.js',
        ...alias,
      },
      setupFilesAfterEnv: ['<rootDir>/tests/setup/dom.ts'],
    },
  ],
};
