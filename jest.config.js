const swc = {
  '^.+\\.tsx?$': [
    '@swc/jest',
    {
      jsc: {
        parser: { syntax: 'typescript', tsx: true, decorators: true },
        transform: { legacyDecorator: true, decoratorMetadata: false, useDefineForClassFields: false },
        target: 'es2022',
      },
      module: { type: 'commonjs' },
    },
  ],
};

// Packages that ship untranspiled sources and must pass through Babel in the React projects.
const transpiled =
  'node_modules/(?!((jest-)?react-native|@react-native(-community)?|expo(nent)?|@expo(nent)?/.*|@expo-google-fonts/.*|react-navigation|@react-navigation/.*|react-native-svg|three(-mesh-bvh)?|@react-three|d3-[a-z]+|internmap|@noble|standard-navigation)/?)';
const assets = { '\\.(woff2?|wasm|glb)$': '<rootDir>/__tests__/support/asset-stub.js' };

/** @type {import('jest').Config} */
module.exports = {
  testTimeout: 30_000,
  projects: [
    {
      displayName: 'node',
      testEnvironment: 'node',
      testMatch: ['<rootDir>/__tests__/{server,solver,shared,cross-check}/**/*.test.ts'],
      transform: swc,
      transformIgnorePatterns: ['node_modules/(?!@noble/)'],
      modulePathIgnorePatterns: ['<rootDir>/.data', '<rootDir>/dist', '<rootDir>/dist-server'],
    },
    {
      displayName: 'web',
      preset: 'jest-expo/web',
      testMatch: ['<rootDir>/__tests__/components/**/*.web.test.{ts,tsx}'],
      transformIgnorePatterns: [transpiled],
      // These packages offer Jest an .mjs, which the preset does not transform.
      moduleNameMapper: {
        ...assets,
        '^(d3-(array|color|format|interpolate|path|time|time-format))$': '<rootDir>/node_modules/$1/dist/$1.js',
      },
      modulePathIgnorePatterns: ['<rootDir>/.data', '<rootDir>/dist', '<rootDir>/dist-server'],
    },
    {
      displayName: 'e2e',
      testEnvironment: 'node',
      testMatch: ['<rootDir>/__tests__/e2e/**/*.test.ts'],
      transform: swc,
      modulePathIgnorePatterns: ['<rootDir>/.data', '<rootDir>/dist', '<rootDir>/dist-server'],
    },
  ],
};
