import nextVitals from 'eslint-config-next/core-web-vitals';
import tseslint from 'typescript-eslint';

const clock = 'Time comes from the database: use work.now inside a transaction or databaseNow() outside one.';
const chance = 'Identities come from newId() in db/identity.ts, secrets from node:crypto; nothing else is left to chance.';
const orm = 'Only db/ speaks to the database: call a repository in db/repositories.';

const noClock = [
  { selector: "MemberExpression[object.name='Date'][property.name='now']", message: clock },
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: clock },
  { selector: "CallExpression[callee.name='Date']", message: clock },
  { selector: "MemberExpression[object.name='Math'][property.name='random']", message: chance },
];

const ormPackages = ['sequelize', 'mariadb', 'umzug'].map((name) => ({ name, message: orm }));

/** Imports a part of the house must not make; the import graph proves the same for dynamic imports. */
const banned = (patterns, paths = ormPackages) => ['error', { paths, patterns }];

const dbFrom = (message) => ({ regex: '^(@|\\.{1,2})(/.*)?/db(/|$)', message });

export default tseslint.config(
  { ignores: ['.next/**', '.local/**', 'node_modules/**', 'public/**', 'next-env.d.ts', 'coverage/**'] },
  ...nextVitals,
  ...tseslint.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': ['error', { 'ts-expect-error': true, 'ts-ignore': true, 'ts-nocheck': true }],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-empty-object-type': 'error',
      eqeqeq: 'error',
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx'] }],
      'max-lines': ['error', { max: 300, skipBlankLines: false, skipComments: false }],
      'max-lines-per-function': ['error', { max: 70 }],
    },
  },
  {
    // A promise that nobody waits for is work that may be lost without a word.
    files: ['app/**/*.{ts,tsx}', 'services/**/*.ts', 'db/**/*.ts'],
    ignores: ['services/engine/**'],
    languageOptions: { parserOptions: { projectService: true } },
    rules: { '@typescript-eslint/no-floating-promises': 'error' },
  },
  {
    files: ['app/**/*.{ts,tsx}', 'components/**/*.{ts,tsx}', 'services/**/*.ts', 'db/**/*.ts', 'proxy.ts'],
    rules: {
      'no-restricted-syntax': [
        'error',
        ...noClock,
        { selector: 'ExportDefaultDeclaration', message: 'Use a named export: one name for one thing everywhere.' },
      ],
    },
  },
  { files: ['*.config.{js,mjs,ts}'], rules: { 'import/no-anonymous-default-export': 'off' } },
  { files: ['db/clock.ts'], rules: { 'no-restricted-syntax': 'off' } },
  {
    // These files are named by the framework, which takes their default export.
    files: [
      'app/**/{page,layout,error,global-error,not-found,loading,template,default,icon,apple-icon,manifest,robots,sitemap}.{ts,tsx}',
    ],
    rules: { 'no-restricted-syntax': ['error', ...noClock] },
  },
  {
    files: ['app/**/*.{ts,tsx}'],
    rules: {
      'no-restricted-imports': banned([dbFrom('Pages and route handlers call a use-case in services/, which calls db/.')]),
    },
  },
  {
    files: ['components/**/*.{ts,tsx}'],
    rules: {
      'no-restricted-imports': banned([
        dbFrom('A component takes its data by props or from a route.'),
        {
          regex: '^@/services/(?!engine(/|$)|contracts(/|$))',
          message: 'A component may use services/engine and services/contracts only; fetch the rest from a route.',
        },
      ]),
    },
  },
  {
    files: ['services/**/*.ts'],
    rules: {
      'no-restricted-imports': banned([
        { regex: '^@/(app|components)(/|$)', message: 'Services know nothing of pages and components.' },
      ]),
    },
  },
  {
    files: ['services/engine/**/*.ts'],
    rules: {
      'no-restricted-imports': banned([
        {
          regex: '^(?!robust-predicates$)[^.]',
          message: 'The engine imports the engine, by relative paths, and nothing else; robust-predicates is its one library.',
        },
      ]),
    },
  },
  {
    // A view is mostly markup: it may be longer than a decision.
    files: ['components/**/*.{ts,tsx}'],
    rules: { 'max-lines-per-function': ['error', { max: 140 }] },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      'max-lines-per-function': 'off',
      'max-lines': ['error', { max: 400 }],
      'no-restricted-syntax': [
        'error',
        {
          selector: "MemberExpression[object.name='vi'][property.name='mock']",
          message: 'Tests run our own modules as they are: use the local stack.',
        },
        {
          selector: 'MemberExpression[property.name=/^(skip|only|todo)$/][object.name=/^(it|test|describe)$/]',
          message: 'A test that does not run proves nothing: make it run or delete it.',
        },
      ],
    },
  },
);
