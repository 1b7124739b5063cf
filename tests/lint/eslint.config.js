import js from '@eslint/js'
import hooks from 'eslint-plugin-react-hooks'
import globals from 'globals'
import tseslint from 'typescript-eslint'

const noDefaultExport = {
  selector: 'ExportDefaultDeclaration',
  message: 'Export by name, so that a thing is called the same everywhere.',
}
const noClock = [
  {
    selector: 'NewExpression[callee.name="Date"][arguments.length=0]',
    message: 'shared has no clock: take the time as a parameter.',
  },
  { selector: 'CallExpression[callee.name="Date"]', message: 'shared has no clock: take the time as a parameter.' },
]

export default tseslint.config(
  {
    ignores: ['dist', 'drizzle', 'public', 'test-results', 'node_modules', 'tests/lint', 'tests/fixtures'],
  },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  js.configs.recommended,
  tseslint.configs.recommended,
  {
    languageOptions: { parserOptions: { projectService: true } },
    rules: {
      eqeqeq: 'error',
      'no-restricted-syntax': ['error', noDefaultExport],
      'object-shorthand': 'error',
      'prefer-const': 'error',
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/consistent-type-definitions': ['error', 'type'],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unnecessary-type-assertion': 'error',
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
      ],
      '@typescript-eslint/only-throw-error': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  {
    files: ['{src,server,shared}/**/*.{ts,tsx}'],
    rules: {
      'max-lines': ['error', { max: 400 }],
      '@typescript-eslint/no-unsafe-argument': 'error',
      '@typescript-eslint/no-unsafe-assignment': 'error',
      '@typescript-eslint/no-unsafe-call': 'error',
      '@typescript-eslint/no-unsafe-member-access': 'error',
      '@typescript-eslint/no-unsafe-return': 'error',
    },
  },
  { files: ['{src,shared}/**/*.{ts,tsx}'], rules: { 'no-console': 'error' } },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-syntax': ['error', noDefaultExport, ...noClock],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'shared has no clock: take the time as a parameter.' },
        { object: 'Math', property: 'random', message: 'shared has no chance: take a generator as a parameter.' },
      ],
    },
  },
  {
    files: ['{src,tests/src}/**/*.{ts,tsx}'],
    ...hooks.configs.flat['recommended-latest'],
  },
  { files: ['{server,tests}/**/*.mjs'], languageOptions: { globals: globals.node } },
  // Tools ask for a default export in their configuration; the top level's is in no tree's tsconfig of its own.
  { files: ['*.config.ts', 'tests/e2e/{playwright.config,global-setup}.ts'], rules: { 'no-restricted-syntax': 'off' } },
  { files: ['*.config.ts'], ...tseslint.configs.disableTypeChecked },
)
