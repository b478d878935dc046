const js = require('@eslint/js');
const reactHooks = require('eslint-plugin-react-hooks');
const tseslint = require('typescript-eslint');

/** Words of react-native that only components/ui may use, so that every text and control has its look and its label. */
const RAW = ['Text', 'TextInput', 'Button'];

module.exports = tseslint.config(
  {
    ignores: [
      'node_modules',
      '.data',
      '.expo',
      'dist',
      'dist-server',
      'coverage',
      'test-results',
      'solver/kernels/assembly',
      'solver/kernels/kernels-wasm.ts',
      'expo-env.d.ts',
    ],
  },
  js.configs.recommended,
  ...tseslint.configs.recommended,
  {
    languageOptions: {
      globals: {
        process: 'readonly', console: 'readonly', setTimeout: 'readonly', clearTimeout: 'readonly', fetch: 'readonly',
        require: 'readonly', module: 'readonly', __dirname: 'readonly', URL: 'readonly', Buffer: 'readonly',
      }, // prettier-ignore
    },
    rules: {
      '@typescript-eslint/no-non-null-assertion': 'off',
      // Tuples and typed arrays are indexed everywhere; a loop over them is clearer than the alternative.
      '@typescript-eslint/prefer-for-of': 'off',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['components/**/*.{ts,tsx}', 'app/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: { 'react-hooks/rules-of-hooks': 'error', 'react-hooks/exhaustive-deps': 'error' },
  },
  {
    files: ['components/**/*.{ts,tsx}', 'app/**/*.{ts,tsx}'],
    ignores: ['components/ui/**'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          paths: [
            {
              name: 'react-native',
              importNames: RAW,
              message: 'Take it from components/ui: it brings the look and asks for a label.',
            },
          ],
        },
      ],
    },
  },
  {
    files: ['components/**/*.{ts,tsx}', 'app/**/*.{ts,tsx}'],
    ignores: ['components/theme/**', 'components/stage/stage-colours.ts'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: 'Literal[value=/^#[0-9a-fA-F]{3,8}$/]',
          message: 'Colours are theme tokens; add one there if none fits.',
        },
      ],
    },
  },
  {
    // The engine's own differ in the last bit from version to version; a bake is the same bytes everywhere.
    files: ['solver/**/*.ts'],
    ignores: ['solver/bench/**', 'solver/cases/**', 'solver/exchange/**'],
    rules: {
      'no-restricted-properties': [
        'error',
        ...['log', 'exp', 'pow', 'cbrt', 'sin', 'cos', 'tan', 'asin', 'acos', 'atan', 'atan2', 'log1p', 'expm1'].map(
          (property) => ({ object: 'Math', property, message: 'Take it from solver/math/elementary.' }),
        ),
      ],
    },
  },
  {
    // Expo's and Jest's configuration files, and set-up scripts that run before anything is installed.
    files: ['*.js', '**/*.mjs', '__tests__/support/*.js', '.dependency-cruiser.js'],
    rules: { '@typescript-eslint/no-require-imports': 'off' },
  },
);
