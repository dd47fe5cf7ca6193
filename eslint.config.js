import { existsSync, readdirSync } from 'node:fs'
import { importX } from 'eslint-plugin-import-x'
import hooks from 'eslint-plugin-react-hooks'
import tseslint from 'typescript-eslint'

/** The arrows of the house: what a folder may not import, by path. */
const features = existsSync('src/features') ? readdirSync('src/features') : []
const zones = [
  {
    target: './core',
    from: ['./server', './src', './migrations', './seeds', './scripts', './tests'],
    message: 'core/ imports nothing but core/.',
  },
  {
    target: './src',
    from: ['./server', './migrations', './seeds', './scripts', './tests'],
    message: 'The client knows core/ and the HTTP API only.',
  },
  { target: './server', from: ['./src', './scripts', './tests'], message: 'The server knows core/ only.' },
  {
    target: ['./migrations', './seeds'],
    from: ['./src', './scripts', './tests'],
    message: 'Migrations and seeds know server/ and core/ only.',
  },
  { target: ['./src/components', './src/api', './src/lib'], from: './src/features', message: 'Shared parts know no feature.' },
  ...features.map((feature) => ({
    target: `./src/features/${feature}`,
    from: './src/features',
    except: [`./${feature}`],
    message: 'Features do not import one another: what two need goes to src/components, src/api or src/lib.',
  })),
]

/** core/ runs in browser, server and worker alike, and gives the same answer every time. */
const PURE = 'core/ is pure: no interface, no server, no database.'
const impurePackages = [
  'react',
  'react-dom',
  'react-router-dom',
  'react-aria-components',
  'express',
  'knex',
  'objection',
  'pg',
  'pino',
  'node:*',
  'fs',
  'path',
]

export default tseslint.config(
  { ignores: ['dist/', 'node_modules/', '.data/', 'uploads/', 'coverage/', 'public/'] },
  {
    files: ['**/*.{ts,tsx}', 'scripts/**/*.mjs'],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    plugins: { 'import-x': importX },
    settings: { 'import-x/resolver': { node: { extensions: ['.ts', '.tsx', '.mjs', '.js'] } } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      'import-x/no-restricted-paths': ['error', { zones }],
      'max-lines': ['error', { max: 400 }],
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true, allowBoolean: true, allowNullish: true }],
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/require-await': 'off',
      // Knex's rows and JSON arrive as `any`; naming their type on arrival is the way to stop it there.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unnecessary-type-assertion': 'off',
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  {
    files: ['core/**/*.ts'],
    rules: {
      'no-restricted-imports': ['error', { patterns: [{ group: impurePackages, message: PURE }] }],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Randomness comes from a seeded generator that is handed in.' },
        { object: 'Date', property: 'now', message: 'The time is handed in.' },
      ],
      'no-restricted-syntax': [
        'error',
        { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'The time is handed in.' },
      ],
      'no-restricted-globals': ['error', 'window', 'document', 'process', 'localStorage', 'fetch'],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': hooks },
    rules: {
      'react-hooks/rules-of-hooks': 'error',
      'react-hooks/exhaustive-deps': 'error',
      'no-restricted-imports': [
        'error',
        { patterns: [{ group: ['express', 'knex', 'objection', 'pg', 'node:*'], message: 'The client runs in a browser.' }] },
      ],
    },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      'no-restricted-properties': [
        'error',
        ...['it', 'test', 'describe'].flatMap((object) =>
          ['only', 'skip', 'todo'].map((property) => ({ object, property, message: 'Every test runs.' })),
        ),
      ],
    },
  },
  {
    // JSON of our own files and of child processes, in plain JavaScript: their shapes are stated in JSDoc.
    files: ['scripts/**/*.mjs'],
    rules: {
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
    },
  },
)
