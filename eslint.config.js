import js from '@eslint/js';
import boundaries from 'eslint-plugin-boundaries';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

/** Rooms of the house and who may import whom: see DEVELOPERS.md, "Who may import whom". */
const rooms = [
  { type: 'shared-units', partialMatch: false, pattern: 'shared/units/**' },
  { type: 'shared-errors', partialMatch: false, pattern: 'shared/errors.ts' },
  { type: 'shared', partialMatch: false, pattern: 'shared/**' },
  { type: 'numerics', partialMatch: false, pattern: 'server/physics/numerics/**' },
  { type: 'constants', partialMatch: false, pattern: 'server/physics/constants/**' },
  { type: 'tables', partialMatch: false, pattern: 'server/physics/tables/**' },
  { type: 'kinematics', partialMatch: false, pattern: 'server/physics/kinematics/**' },
  { type: 'potentials', partialMatch: false, pattern: 'server/physics/potentials/**' },
  { type: 'methods', partialMatch: false, pattern: 'server/physics/methods/**' },
  { type: 'observables', partialMatch: false, pattern: 'server/physics/observables/**' },
  { type: 'counting', partialMatch: false, pattern: 'server/physics/counting/**' },
  { type: 'physics', partialMatch: false, pattern: 'server/physics/*.ts' },
  { type: 'server', partialMatch: false, pattern: 'server/**' },
  { type: 'feature', partialMatch: false, pattern: 'src/features/*/**', capture: ['feature'] },
  { type: 'layouts', partialMatch: false, pattern: 'src/layouts/**' },
  { type: 'src', partialMatch: false, pattern: 'src/{components,lib,styles}/**' },
  { type: 'app', partialMatch: false, pattern: 'src' },
  { type: 'tests', partialMatch: false, pattern: 'tests/**' },
  { type: 'scripts', partialMatch: false, pattern: 'scripts/**' },
];
const physicsBase = ['numerics', 'constants', 'shared-units', 'shared-errors'];
const allow = [
  ['shared-units', ['shared-units', 'shared-errors']],
  ['shared-errors', []],
  ['shared', ['shared', 'shared-units', 'shared-errors']],
  ['numerics', ['numerics', 'shared-errors']],
  ['constants', ['constants', 'shared-units', 'shared-errors']],
  ['tables', ['tables', ...physicsBase]],
  ['kinematics', ['kinematics', 'tables', ...physicsBase]],
  ['potentials', ['potentials', 'tables', ...physicsBase]],
  ['methods', ['methods', 'kinematics', 'potentials', 'tables', ...physicsBase]],
  ['observables', ['observables', 'methods', 'kinematics', 'potentials', 'tables', ...physicsBase]],
  [
    'counting',
    ['counting', 'observables', 'methods', 'kinematics', 'potentials', 'tables', ...physicsBase],
  ],
  [
    'physics',
    [
      'physics',
      'counting',
      'observables',
      'methods',
      'kinematics',
      'potentials',
      'tables',
      ...physicsBase,
    ],
  ],
  [
    'server',
    [
      'server',
      'physics',
      'counting',
      'observables',
      'methods',
      'kinematics',
      'potentials',
      'tables',
      ...physicsBase,
      'shared',
    ],
  ],
  ['feature', ['src', 'shared', 'shared-units', 'shared-errors']],
  ['src', ['src', 'shared', 'shared-units', 'shared-errors']],
  ['layouts', ['layouts', 'feature', 'src', 'shared', 'shared-units', 'shared-errors']],
  ['app', ['app', 'layouts', 'feature', 'src', 'shared', 'shared-units', 'shared-errors']],
];

export default tseslint.config(
  { ignores: ['dist', 'node_modules', '.data', '.test'] },
  js.configs.recommended,
  { files: ['**/*.mjs', '**/*.js'], languageOptions: { globals: globals.node } },
  {
    files: ['**/*.ts', '**/*.tsx'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
      '@typescript-eslint/no-misused-promises': [
        'error',
        { checksVoidReturn: { attributes: false } },
      ],
      'no-empty': ['error', { allowEmptyCatch: false }],
      eqeqeq: 'error',
    },
  },
  {
    files: ['src/**/*.{ts,tsx}', 'server/**/*.ts', 'shared/**/*.ts'],
    plugins: { boundaries },
    settings: {
      'boundaries/elements': rooms,
      'boundaries/files': [{ category: 'errors', pattern: 'shared/errors.ts' }],
      'import/resolver': { typescript: { project: './tsconfig.json' } },
    },
    rules: {
      'boundaries/dependencies': [
        'error',
        {
          default: 'disallow',
          policies: [
            ...allow.map(([from, to]) => ({
              from: { element: { type: from } },
              allow: to.map((type) => ({ to: { element: { type } } })),
            })),
            // The closed set of errors is everybody's.
            { allow: [{ to: { file: { categories: 'errors' } } }] },
            // A feature never imports another feature: pages compose them.
            {
              from: { element: { type: 'feature' } },
              allow: [
                {
                  to: {
                    element: {
                      type: 'feature',
                      captured: { feature: '{{from.captured.feature}}' },
                    },
                  },
                },
              ],
            },
          ],
        },
      ],
      'boundaries/no-unknown-dependencies': 'error',
    },
  },
  { files: ['src/**/*.{ts,tsx}'], ...reactHooks.configs.flat.recommended },
);
