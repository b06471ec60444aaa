// The walls of the house as lint rules, besides the usual care. Metro would bundle a server file into a screen without a word.
import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

const root = path.dirname(fileURLToPath(import.meta.url));

/** Imports of a top folder (or a path in it), written with the alias or by climbing. */
const inFolder = (folder) => `^(@|(\\.\\.?/)*\\.\\.)/${folder}(/|$)`;
const forbid = (folders, message, allowTypeImports = false) => folders.map((folder) => ({ regex: inFolder(folder), message, allowTypeImports }));
const forbidPackages = (names, message) => [{ regex: `^(${names.join('|')})(/|$)`, message }];

const nodeOnly = [
  'node:.*', 'fs', 'path', 'os', 'http', 'https', 'net', 'crypto', 'child_process', 'stream', 'worker_threads',
  'express', 'sequelize', 'pg', 'pg-boss', 'umzug', 'pino', 'pino-http', 'nodemailer', 'mailparser', 'smtp-server', 'node-cron', 'helmet', 'jsonwebtoken', 'bcryptjs', 'openmeteo',
];
const screenOnly = ['react', 'react-dom', 'react-native.*', 'expo.*', 'lucide-react-native', 'victory.*', 'sonner', '@tanstack/.*', 'react-hook-form', '@hookform/.*'];

const everywhere = {
  paths: [
    { name: 'lucide-react-native', message: "Import one icon: 'lucide-react-native/icons/<name>'. The barrel brings all of them into the bundle." },
    { name: 'date-fns', message: "Import one function: 'date-fns/<function>'. The barrel costs 22 kB." },
    { name: 'victory', message: "Import the part: 'victory-chart', 'victory-line', 'victory-axis' … The barrel brings the whole library." },
    { name: 'react-native', importNames: ['Alert'], message: 'Alert does nothing on the web: use the dialog of components/ui.' },
  ],
  patterns: [{ regex: '^\\.{1,2}/.*\\.js$', message: 'Leave out the ending .js.' }],
};

const walls = (...patterns) => ({
  '@typescript-eslint/no-restricted-imports': ['error', { paths: everywhere.paths, patterns: [...everywhere.patterns, ...patterns.flat(Infinity)] }],
});

const clockRules = [
  { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'Ask the clock: context.clock on the server, components/data/now.ts on screens, an argument in scheduling/.' },
  { selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']", message: 'Ask the clock: context.clock on the server, components/data/now.ts on screens, an argument in scheduling/.' },
];
const environmentRules = [
  { selector: "MemberExpression[object.name='process'][property.name='env']", message: 'Only server/env.ts reads the environment: take the value from the context.' },
];
const randomRules = [
  { selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']", message: 'scheduling/ gives the same answer for the same input: take a random source as an argument.' },
  { selector: "MemberExpression[object.name='performance'][property.name='now']", message: 'scheduling/ knows no clock: take the time as an argument.' },
];
const unfinishedTestRules = [
  { selector: 'MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(skip|only|todo|fixme|failing)$/]', message: 'A test runs and can fail, or it is not there.' },
  { selector: 'CallExpression[callee.name=/^(xit|xtest|xdescribe|fit|fdescribe)$/]', message: 'A test runs and can fail, or it is not there.' },
];
const restrict = (...rules) => ({ 'no-restricted-syntax': ['error', ...rules.flat(Infinity)] });

/** Folders of components/ that any feature may use. */
const commonParts = ['ui', 'theme', 'data'];
const foldersOf = (folder) => (fs.existsSync(path.join(root, folder))
  ? fs.readdirSync(path.join(root, folder), { withFileTypes: true }).filter((entry) => entry.isDirectory()).map((entry) => entry.name)
  : []);

/** Everything in components/ but the named folders, from a file of one of its folders. */
const otherParts = (allowed, message) => [
  { regex: `^(@|(\\.\\.?/)*\\.\\.)/components/(?!(${allowed.join('|')})(/|$))`, message },
  ...foldersOf('components').filter((name) => !allowed.includes(name)).map((name) => ({ regex: `^(\\.\\./)+${name}(/|$)`, message })),
];
const screensOnly = [
  forbid(['server', 'app'], 'Screens speak with the server through components/data and know its contracts from shared/.'),
  forbidPackages(nodeOnly, 'This runs on the server only.'),
];

export default tseslint.config(
  { ignores: ['node_modules/**', '.data/**', '.expo/**', 'dist/**', 'expo-env.d.ts', 'test-results/**', 'playwright-report/**'] },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  {
    files: ['**/*.{ts,tsx,mjs,js}'],
    plugins: { '@typescript-eslint': tseslint.plugin },
    languageOptions: { parser: tseslint.parser },
    rules: {
      curly: ['error', 'multi-line'],
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-var': 'error',
      'prefer-const': 'error',
      'object-shorthand': ['error', 'properties'],
      'no-else-return': 'error',
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'], location: 'start' }],
      quotes: ['error', 'single', { avoidEscape: true, allowTemplateLiterals: true }],
      semi: ['error', 'always'],
      'no-unused-vars': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrors: 'all', ignoreRestSiblings: true }],
    },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.recommended],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: root } },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false, arguments: false } }],
      '@typescript-eslint/no-unnecessary-type-assertion': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrors: 'all', ignoreRestSiblings: true }],
      'no-console': 'error',
      ...walls(),
      ...restrict(clockRules, environmentRules),
    },
  },
  {
    // No value of unknown type travels through the product; tests may take answers apart as they come.
    files: ['{app,components,scheduling,shared,server}/**/*.{ts,tsx}'],
    rules: {
      'max-lines': ['error', { max: 450, skipBlankLines: true, skipComments: true }],
      '@typescript-eslint/no-unsafe-assignment': 'error',
      '@typescript-eslint/no-unsafe-argument': 'error',
      '@typescript-eslint/no-unsafe-call': 'error',
      '@typescript-eslint/no-unsafe-member-access': 'error',
      '@typescript-eslint/no-unsafe-return': 'error',
    },
  },
  {
    files: ['{app,components}/**/*.{ts,tsx}', 'tests/components/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: {
      'react-hooks/rules-of-hooks': 'error',
      'react-hooks/exhaustive-deps': 'error',
      'react-hooks/set-state-in-render': 'error',
      'react-hooks/static-components': 'error',
      'react-hooks/purity': 'error',
    },
  },

  // The walls.
  {
    files: ['scheduling/**/*.ts'],
    rules: {
      ...walls(
        forbid(['app', 'components', 'shared', 'server', 'tests'], 'scheduling/ imports nothing but scheduling/.'),
        forbidPackages([...nodeOnly, ...screenOnly], 'scheduling/ is pure computation: no input or output, no screens, no server.'),
      ),
      ...restrict(clockRules, environmentRules, randomRules),
    },
  },
  {
    files: ['shared/**/*.{ts,tsx}'],
    rules: walls(
      forbid(['app', 'components', 'server', 'tests'], 'shared/ is what client and server both say: it imports shared/ and scheduling/units.'),
      forbid(['scheduling/(?!units(/|$)).+'], 'From scheduling/ shared/ takes units and types: write import type.', true),
      forbidPackages([...nodeOnly, ...screenOnly], 'shared/ runs on both sides.'),
    ),
  },
  {
    files: ['app/**/*.{ts,tsx}'],
    rules: walls(
      forbid(['server', 'scheduling', 'tests'], 'A route reads its parameters and renders one screen from components/.'),
      forbidPackages(nodeOnly, 'This runs on the server only.'),
    ),
  },
  {
    files: ['components/**/*.{ts,tsx}'],
    rules: walls(screensOnly, forbid(['tests'], 'Tests import the product, never the other way round.')),
  },
  ...foldersOf('components').filter((name) => !commonParts.includes(name)).map((name) => ({
    files: [`components/${name}/**/*.{ts,tsx}`],
    rules: walls(screensOnly, otherParts([...commonParts, name], 'A feature uses ui, theme, data and itself. What two features need goes to components/ui or components/data.')),
  })),
  {
    files: ['components/ui/**/*.{ts,tsx}'],
    rules: walls(screensOnly, otherParts(['ui', 'theme'], 'Primitives know the theme and nothing else of the product.')),
  },
  {
    files: ['components/theme/**/*.{ts,tsx}'],
    rules: walls(screensOnly, otherParts(['theme'], 'The theme depends on nothing else.')),
  },
  {
    files: ['components/data/**/*.{ts,tsx}'],
    rules: walls(screensOnly, otherParts(['data'], 'Data hooks draw nothing: they depend on shared/ only.')),
  },
  {
    files: ['server/**/*.ts'],
    rules: walls(forbid(['app', 'components', 'tests'], 'The server knows screens only through shared/.'), forbidPackages(screenOnly, 'This runs in the browser only.')),
  },
  {
    files: ['server/routes/**/*.ts'],
    rules: walls(
      forbid(['app', 'components', 'tests'], 'The server knows screens only through shared/.'),
      forbid(['server/(models|jobs|migrations|seeds|adapters)', '(models|jobs|migrations|seeds|adapters)'], 'A route guards, calls a command or a read model, and presents: no queries and no outside services here.', true),
      forbid(['scheduling'], 'A route computes nothing: put it in a command or a read model.', true),
      forbidPackages(['sequelize', 'pg', 'pg-boss', 'nodemailer'], 'A route does no queries: put them in a read model or a command.'),
    ),
  },
  {
    files: ['server/{commands,jobs}/**/*.ts'],
    rules: walls(
      forbid(['app', 'components', 'tests'], 'The server knows screens only through shared/.'),
      forbid(['server/routes', 'routes'], 'Routes call commands, never the other way round.'),
      forbid(['server/adapters', 'adapters'], 'Outside services come with the context.', true),
    ),
  },
  {
    files: ['server/{policies,presenters}/**/*.ts'],
    rules: walls(
      forbid(['app', 'components', 'tests'], 'The server knows screens only through shared/.'),
      forbid(['server/(routes|commands|jobs|adapters)', '(routes|commands|jobs|adapters)'], 'Policies decide and presenters show: both only look at what they are given.', true),
    ),
  },

  // Where the exceptions live.
  {
    // Served as they are, so written for browsers that know nothing newer.
    files: ['assets/web/**/*.js'],
    rules: { 'no-var': 'off', '@typescript-eslint/no-unused-vars': ['error', { caughtErrors: 'none' }] },
  },
  { files: ['server/migrations/**'], rules: { 'max-lines': 'off' } },
  { files: ['server/env.ts'], rules: restrict(clockRules) },
  { files: ['server/adapters/clock*', 'server/adapters/clock/**', 'components/data/now.ts'], rules: restrict(environmentRules) },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: { ...restrict(unfinishedTestRules), '@typescript-eslint/no-non-null-assertion': 'off', 'no-console': 'error' },
  },
  { files: ['server/scripts/**', 'tests/e2e/playwright.config.ts', 'tests/bench/**', 'tests/setup/**'], rules: { 'no-console': 'off', 'no-restricted-syntax': 'off' } },
);
