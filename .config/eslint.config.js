import tseslint from 'typescript-eslint';

// The one-way rule: a stage imports only from stages before it in this list (and from itself).
// The spine, src/analyse.ts, stands between `result` and `report`.
const stages = [
  'numeric',
  'random',
  'problem',
  'table',
  'input',
  'statistic',
  'null',
  'plan',
  'pvalue',
  'effect',
  'cell',
  'order',
  'strata',
  'pairs',
  'design',
  'power',
  'family',
  'result',
  'report',
  'batch',
  'record',
  'cli',
];

const readsOnlyTheResult = {
  regex: '^(\\.\\./)+(?!\\.\\./|result/|pictures/|[\\w-]+\\.js$)[\\w-]+/',
  message: 'Reports read the result and nothing else.',
};

const oneWay = stages.map((stage, place) => ({
  files: [`src/${stage}/**/*.ts`],
  rules: {
    'no-restricted-imports': [
      'error',
      {
        patterns: [
          {
            regex: `^\\.\\./(.*/)?(${stages.slice(place + 1).join('|') || 'nothing-after-this'})/`,
            message: `${stage} may import only from stages before it.`,
          },
          ...(place < stages.indexOf('report')
            ? [{ regex: '(^|/)analyse\\.js$', message: 'The spine imports the stages, not the other way round.' }]
            : []),
          ...(stage === 'numeric' || stage === 'random'
            ? [{ regex: '^\\.\\./', message: `${stage} is a leaf: it imports nothing of ours.` }]
            : []),
          ...(stage === 'report' ? [readsOnlyTheResult] : []),
        ],
      },
    ],
  },
}));

const onlyTheShellTouchesTheWorld = {
  files: ['src/**/*.ts'],
  ignores: ['src/cli/**'],
  rules: {
    'no-restricted-globals': ['error', 'process', 'console'],
    'no-restricted-properties': [
      'error',
      { object: 'Math', property: 'random', message: 'Randomness is an argument.' },
      { object: 'Date', property: 'now', message: 'No choice is made by the clock.' },
    ],
  },
};

export default tseslint.config(
  { ignores: ['dist', 'node_modules'] },
  ...tseslint.configs.strict,
  {
    rules: {
      eqeqeq: 'error',
      'no-var': 'error',
      'prefer-const': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      // Indexed loops over typed arrays are what this program is made of; `!` says "in range" there.
      '@typescript-eslint/no-non-null-assertion': 'off',
      // { left, ...rest } is how a field is left out.
      '@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true }],
    },
  },
  onlyTheShellTouchesTheWorld,
  ...oneWay,
);
