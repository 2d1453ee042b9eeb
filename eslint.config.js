import js from '@eslint/js';
import reactHooks from 'eslint-plugin-react-hooks';
import ts from 'typescript-eslint';

/**
 * Import rules, folder by folder. A later block replaces an earlier one's `no-restricted-imports`, so each
 * folder's whole list is built here, on disjoint globs. `tests/house/import-rules.test.ts` tries each.
 */
// Regular expressions, since in the other kind of pattern a leading # begins a comment.
const SERVER = { regex: '^#(server|migrations|seeders)/', message: 'Server code stays on the server.' };
const CLIENT = { regex: '^#src/', message: 'Client code stays in the client.' };
const TESTS = { regex: '^#tests/', message: 'Product code does not import tests.' };
const UPWARD = { regex: '^\\.\\./', message: 'Inside a folder import from ./, else by #name.' };
const FEATURES = {
  regex: '^#src/features/',
  message: 'Features are composed by routes, never by each other or by components.',
};
const APP = {
  regex: '^#src/(app/(?!paths\\.ts$)|routes/)',
  message: 'Only routes and app know these.',
};
const MODULE_INSIDES = {
  regex: '^#server/modules/[^/]+/(?!index\\.ts$)',
  message: 'Another module is entered by its index.ts; your own files by ./',
};
const ENGINE_ONLY = {
  regex: '^(?!decimal\\.js$|#shared/decimal\\.ts$|#shared/engine/|\\.{1,2}/)',
  message: 'The engine imports decimals and itself, nothing else.',
};

/**
 * @param {...object} patterns what the folder may not import
 * @returns {import('eslint').Linter.RulesRecord}
 */
function restricted(...patterns) {
  return { 'no-restricted-imports': ['error', { patterns: [TESTS, ...patterns] }] };
}

const NO_STATIC_WRITES = {
  selector:
    "CallExpression[callee.type='MemberExpression'][callee.object.name=/^[A-Z]/][callee.property.name=/^(update|destroy|increment|decrement|upsert)$/]",
  message: 'Static writes go around the act: they belong in server/db.',
};

export default ts.config(
  { ignores: ['node_modules/', 'dist/', 'coverage/', '.cache/', '.data/', '.data-test/'] },
  js.configs.recommended,
  ...ts.configs.strict,
  { files: ['src/**'], ...reactHooks.configs.flat['recommended-latest'] },
  {
    rules: {
      '@typescript-eslint/no-non-null-assertion': 'off',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      eqeqeq: 'error',
      'no-console': 'error',
      'prefer-const': 'error',
    },
  },
  {
    files: [
      'server/boot/**',
      'server/migrate.ts',
      'server/seed-demo.ts',
      'tests/bench/**',
      'tests/boot/**',
      'tests/look/**',
    ],
    languageOptions: {
      globals: {
        process: 'readonly',
        console: 'readonly',
        URL: 'readonly',
        setTimeout: 'readonly',
        setInterval: 'readonly',
        clearTimeout: 'readonly',
        clearInterval: 'readonly',
        fetch: 'readonly',
        Buffer: 'readonly',
        AbortSignal: 'readonly',
        AbortController: 'readonly',
        performance: 'readonly',
      },
    },
    rules: { 'no-console': 'off' },
  },
  { files: ['shared/engine/**'], ignores: ['**/*.test.ts'], rules: restricted(ENGINE_ONLY) },
  { files: ['shared/**'], ignores: ['shared/engine/**'], rules: restricted(SERVER, CLIENT) },
  { files: ['shared/engine/**/*.test.ts'], rules: restricted(SERVER, CLIENT) },
  { files: ['src/components/**', 'src/lib/**'], rules: restricted(SERVER, FEATURES, APP) },
  { files: ['src/features/**'], rules: restricted(SERVER, FEATURES, APP) },
  { files: ['src/routes/**', 'src/app/**', 'src/main.tsx'], rules: restricted(SERVER) },
  {
    files: ['server/modules/**'],
    ignores: ['**/*.routes.ts'],
    rules: {
      ...restricted(CLIENT, UPWARD, MODULE_INSIDES),
      'no-restricted-syntax': ['error', NO_STATIC_WRITES],
    },
  },
  {
    files: ['server/modules/**/*.routes.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            TESTS,
            CLIENT,
            UPWARD,
            MODULE_INSIDES,
            { group: ['./*.model.ts'], message: 'Routes call services, not models.' },
          ],
          paths: [{ name: 'sequelize', message: 'Routes know no database.' }],
        },
      ],
    },
  },
  {
    files: ['server/**'],
    ignores: ['server/modules/**', 'server/boot/**'],
    rules: restricted(CLIENT, MODULE_INSIDES),
  },
);
