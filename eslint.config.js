import expo from 'eslint-config-expo/flat.js'
import prettier from 'eslint-config-prettier'
import { defineConfig, globalIgnores } from 'eslint/config'

const CLIENT = ['./app', './components', './hooks', './constants']

/** Imports that would turn the direction of dependencies around. `except` is relative to `from`. */
const zones = [
  {
    target: './converters',
    from: [...CLIENT, './server', './db'],
    message: 'The engine imports nothing of the rest of the product.',
  },
  { target: './db', from: [...CLIENT, './server'], message: 'The database layer knows neither server nor screens.' },
  { target: './server', from: CLIENT, message: 'The server never imports the client.' },
  {
    target: CLIENT,
    from: './server',
    except: ['./contract'],
    message: 'The client sees the server through server/contract alone.',
  },
  { target: CLIENT, from: './db', message: 'The client never imports the database layer.' },
  {
    target: './server/contract',
    from: ['./server/app.ts', './server/index.ts', './server/env.ts', './server/errors.ts'],
    message: 'The contract is shared with the client and stands alone.',
  },
  ...['compute', 'middleware', 'routes', 'services', 'presenters'].map((folder) => ({
    target: './server/contract',
    from: `./server/${folder}`,
    message: 'The contract is shared with the client and stands alone.',
  })),
  { target: './server/contract', from: './db', message: 'The contract is shared with the client and stands alone.' },
  { target: './server/services', from: './server/routes', message: 'Routes call services, not the other way round.' },
  { target: './hooks', from: ['./app', './components'], message: 'Hooks serve screens and know none of them.' },
  { target: './components', from: './app', message: 'Components serve screens and know none of them.' },
  { target: './constants', from: ['./app', './components', './hooks'], message: 'Constants import nothing of ours.' },
  {
    target: ['./server/routes', './server/middleware'],
    from: ['./db/schema', './db/queries'],
    message: 'Routes call services, services call queries.',
  },
]

const nodeGlobals = Object.fromEntries(
  ['Buffer', 'URL', 'AbortController', 'AbortSignal', 'clearTimeout', 'fetch', 'process', 'setTimeout'].map((name) => [
    name,
    'readonly',
  ]),
)

export default defineConfig([
  globalIgnores(['dist/', 'build/', '.expo/', '.data/', 'expo-env.d.ts', 'db/migrations/']),
  expo,
  prettier,
  {
    rules: {
      'import/no-restricted-paths': ['error', { zones }],
      'import/no-cycle': 'error',
      eqeqeq: 'error',
      'no-console': ['error', { allow: ['error'] }],
    },
  },
  {
    files: ['**/*.ts', '**/*.tsx'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      // A schema and the type inferred from it share one name; the compiler itself refuses real redeclarations.
      '@typescript-eslint/no-redeclare': 'off',
    },
  },
  {
    // The screens see the engine's shapes and units; the computing itself stays on the server.
    files: CLIENT.map((folder) => `${folder.slice(2)}/**/*.{ts,tsx}`),
    rules: {
      '@typescript-eslint/no-restricted-imports': [
        'error',
        {
          paths: [
            {
              name: 'react-native',
              importNames: ['Text', 'TextInput', 'Button'],
              message: 'Use the wrapper from components/ui.',
            },
          ],
          patterns: [
            {
              regex: '^@/converters/(?!document$|quantities$)',
              allowTypeImports: true,
              message: 'Only document.ts and quantities.ts (and types) of the engine reach the browser.',
            },
          ],
        },
      ],
    },
  },
  {
    files: ['components/ui/**/*.{ts,tsx}'],
    rules: { '@typescript-eslint/no-restricted-imports': 'off' },
  },
  {
    // The same input gives the same answer: no clock, no chance, no input or output in the engine.
    files: ['converters/**/*.ts'],
    rules: {
      'no-restricted-globals': ['error', 'process', 'performance', 'fetch', 'setTimeout', 'setInterval'],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Use a seeded generator.' },
        { object: 'Date', property: 'now', message: 'The engine has no clock.' },
      ],
      'no-restricted-imports': [
        'error',
        { patterns: ['node:*', 'fs', 'path', 'react*', 'express', 'pg', 'drizzle-orm*'] },
      ],
    },
  },
  {
    files: ['**/*.cjs'],
    languageOptions: { globals: { __dirname: 'readonly', module: 'writable', require: 'readonly', ...nodeGlobals } },
  },
  {
    files: ['scripts/**/*.{mjs,ts}', '*.config.{js,ts}'],
    languageOptions: { globals: nodeGlobals },
    // What scripts load from build/ does not exist before the first build.
    rules: { 'no-console': 'off', 'import/no-unresolved': ['error', { ignore: ['/build/'] }] },
  },
])
