import hooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'

/*
 * The layers of the house, lowest first. A folder may import from the folders it lists, and from itself.
 * The pure ones know no React, Next, database, clock or environment, so that the browser, its worker, the server and
 * the tests run the same code.
 */
const pure = {
  'lib/numerics': [],
  'lib/units': [],
  'lib/fluids': ['lib/numerics', 'lib/units'],
  'lib/vessel': ['lib/numerics', 'lib/units', 'lib/fluids'],
  'lib/formula': ['lib/units'],
  'lib/sheet': ['lib/numerics', 'lib/units', 'lib/fluids', 'lib/vessel', 'lib/formula'],
  'lib/snapshot': ['lib/numerics', 'lib/units', 'lib/fluids', 'lib/vessel', 'lib/formula', 'lib/sheet'],
  'lib/auth/policies': [],
}
const own = [
  'app',
  'components',
  'db',
  'realtime',
  'tests',
  'lib/cli',
  'lib/auth',
  'lib/env',
  'lib/log',
  'lib/workspace',
  'lib/mail',
  'lib/storage',
  'lib/report',
]
const outside = [
  'react',
  'react-dom',
  'next',
  'next-auth',
  'drizzle-orm',
  '@electric-sql/pglite',
  'ws',
  'pino',
  'fs',
  'path',
  'process',
]

const layer = (files, forbidden, message, packages = []) => ({
  files,
  rules: {
    'no-restricted-imports': [
      'error',
      {
        patterns: [
          { group: forbidden.flatMap((part) => [`@/${part}`, `@/${part}/**`]), message },
          { group: ['../../../*'], message: 'Write a path that climbs this far from the root: @/…' },
          ...(packages.length
            ? [
                {
                  group: packages.flatMap((name) => [name, `${name}/*`, `node:${name}`]),
                  message: 'This folder is pure: it runs in the browser, its worker, the server and the tests alike.',
                },
              ]
            : []),
        ],
      },
    ],
  },
})

const pureLayers = Object.entries(pure).map(([part, allowed]) => {
  const others = Object.keys(pure).filter(
    (name) => name !== part && !allowed.includes(name) && !name.startsWith(`${part}/`),
  )
  return layer(
    [`${part}/**/*.{ts,tsx}`],
    [...others, ...own.filter((name) => !part.startsWith(name))],
    `${part} may know only ${allowed.join(', ') || 'itself'} and lib/errors: see DEVELOPERS.md, layers.`,
    outside,
  )
})

export default tseslint.config(
  {
    ignores: [
      'node_modules/**',
      '.next/**',
      'data/**',
      'lib/formula/parser*.ts',
      'next-env.d.ts',
      'db/migrations/**',
      'pictures/**',
      'test-results/**',
    ],
  },
  ...tseslint.configs.recommended,
  hooks.configs.flat['recommended-latest'] ?? hooks.configs['recommended-latest'],
  {
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      eqeqeq: ['error', 'always'],
      'no-console': 'error',
    },
  },
  { files: ['lib/cli/**', 'tests/**'], rules: { 'no-console': 'off' } },
  ...pureLayers,
  layer(['db/**/*.ts'], ['app', 'components', 'realtime', 'tests'], 'db speaks SQL and knows nobody above it.'),
  layer(
    ['components/**/*.{ts,tsx}'],
    [
      'app',
      'db',
      'tests',
      'lib/cli',
      'lib/env',
      'lib/log',
      'lib/auth/server',
      'lib/workspace/server',
      'lib/mail',
      'lib/storage',
    ],
    'Components get data and actions as props.',
    ['drizzle-orm', '@electric-sql/pglite', 'ws', 'pino', 'fs', 'path'],
  ),
  layer(
    ['lib/*/server/**/*.ts'],
    ['app', 'components', 'realtime', 'tests', 'db/schema'],
    'A use-case knows the database by its queries, and nobody above it.',
    ['drizzle-orm', '@electric-sql/pglite', 'ws'],
  ),
  layer(['realtime/**/*.ts'], ['app', 'components', 'tests'], 'realtime uses sheet/doc, auth and db.'),
  layer(['app/**/*.{ts,tsx}'], ['db/schema', 'tests', 'lib/cli'], 'app reads the database through use-cases.', [
    'drizzle-orm',
    '@electric-sql/pglite',
  ]),
)
