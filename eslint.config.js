/**
 * The rules of the code. Besides the usual ones: the arrows between the layers, and the purity of the engine.
 *
 *   cells -> rows -> beam -> integrate -> ask -> functions, taskpane, workbench
 */
const js = require('@eslint/js');
const prettier = require('eslint-config-prettier');
const importX = require('eslint-plugin-import-x');
const officeAddins = require('eslint-plugin-office-addins');
const globals = require('globals');
const tseslint = require('typescript-eslint');

/** All eight rules for code that talks to the workbook through the host's proxies. */
const OFFICE_RULES = [
  'call-sync-after-load',
  'call-sync-before-read',
  'load-object-before-read',
  'no-context-sync-in-loop',
  'no-empty-load',
  'no-navigational-load',
  'no-office-initialize',
  'test-for-null-using-isNullObject',
];

const engineDoor = 'src/index.ts is the only door of the engine.';
const oneWay = (layer) =>
  `${layer} stands below this: cells -> rows -> beam -> integrate -> ask -> the rest.`;
const zone = (target, from, message, except) => ({ target, from, message, ...(except && { except }) });

/** What may not be imported from where. `target` is the file that imports. */
const ARROWS = [
  ...['./functions', './taskpane', './workbench'].map((target) =>
    zone(target, './src', engineDoor, ['./index.ts']),
  ),
  ...['./functions', './taskpane', './workbench', './tests', './scripts', './bench'].map((from) =>
    zone('./src', from, 'The engine knows nothing of those who use it.'),
  ),
  zone('./src/beam', './src/rows', oneWay('beam')),
  zone('./src/beam', './src/integrate', oneWay('beam')),
  zone('./src/beam', './src/ask', oneWay('beam')),
  zone('./src/rows', './src/integrate', oneWay('rows')),
  zone('./src/rows', './src/ask', oneWay('rows')),
  zone('./src/rows', './src/open.ts', oneWay('rows')),
  zone('./src/integrate', './src/rows', oneWay('integrate')),
  zone('./src/integrate', './src/ask', oneWay('integrate')),
  zone('./src/integrate', './src/open.ts', oneWay('integrate')),
  ...['./src/rows', './src/beam', './src/integrate', './src/ask', './src/published'].map((target) =>
    zone(target, './src/index.ts', 'Inside the engine, import the module itself.'),
  ),
  zone('./functions', './taskpane', 'The functions must not wait for the pane.'),
  zone('./functions', './workbench', 'The workbench does not ship.'),
  zone('./taskpane', './functions', 'The pane asks the engine, not the worksheet functions.'),
  zone('./taskpane', './workbench', 'The workbench does not ship.'),
  zone('./workbench', './functions', 'The workbench runs the built bundle, as a host does.'),
];

/** The engine's answers depend on its arguments alone. */
const IMPURE = [
  'Date',
  'performance',
  'window',
  'document',
  'navigator',
  'localStorage',
  'fetch',
  'process',
  'console',
  'setTimeout',
  'setInterval',
  'Office',
  'Excel',
  'CustomFunctions',
];

module.exports = tseslint.config(
  { ignores: ['dist/', 'node_modules/', 'coverage/', 'reports/', 'tmp/'] },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    plugins: { 'import-x': importX, 'office-addins': officeAddins },
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: __dirname } },
    settings: {
      'import-x/resolver-next': [importX.createNodeResolver({ extensions: ['.ts', '.tsx', '.js', '.json'] })],
    },
    rules: {
      'import-x/no-restricted-paths': ['error', { basePath: __dirname, zones: ARROWS }],
      ...Object.fromEntries(OFFICE_RULES.map((rule) => [`office-addins/${rule}`, 'error'])),
      eqeqeq: ['error', 'always'],
      'no-eval': 'error',
      // the type checker knows the globals
      'no-undef': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
    },
  },
  {
    files: ['src/**/*.ts'],
    rules: {
      'no-restricted-globals': ['error', ...IMPURE.map((name) => ({ name, message: 'The engine is pure.' }))],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'The engine is pure.' },
      ],
    },
  },
  {
    // the metadata generator reads `any[][]` literally, and the host decides what is in it
    files: ['functions/*.ts'],
    rules: { '@typescript-eslint/no-explicit-any': 'off', '@typescript-eslint/no-unsafe-argument': 'off' },
  },
  {
    // tests take hosts, files and messages apart, whose shapes are what they check
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      // published digits are written as published, more of them than a double holds
      'no-loss-of-precision': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      '@typescript-eslint/unbound-method': 'off',
      '@typescript-eslint/require-await': 'off',
    },
  },
  {
    files: ['**/*.{js,cjs}'],
    languageOptions: { sourceType: 'commonjs', globals: globals.node },
  },
  {
    files: ['**/*.mjs'],
    languageOptions: { sourceType: 'module', globals: globals.node },
  },
  prettier,
);
