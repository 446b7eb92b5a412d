// Results written out by hand for the tests of words and reports, which must not depend on the engines. Their numbers
// come from exact rational sums, and from simulations with a generator of another kind, so they are true to their tables;
// every table is invented.
import { methodsFor } from '../../src/result/methods.js';
import { sentenceFor } from '../../src/result/sentence.js';
import type { ResultBeforeWords } from '../../src/result/describe.js';
import type { PValue, Result } from '../../src/result/result.js';

type InputParts = Pick<Result['input'], 'rowLabels' | 'columnLabels' | 'counts'> & Partial<Result['input']>;
export interface SampleParts {
  input: InputParts;
  plan?: Partial<Result['plan']>;
  statistic: Result['statistic'];
  pValues: PValue[];
  diagnostics?: Partial<Result['diagnostics']>;
  notes?: Result['notes'];
}

const sum = (counts: readonly number[]): number => counts.reduce((total, count) => total + count, 0);

function inputEcho(parts: InputParts): Result['input'] {
  const rowTotals = parts.counts.map(sum);
  const columnTotals = parts.columnLabels.map((_, j) => sum(parts.counts.map((row) => row[j]!)));
  return {
    source: { form: 'inline' },
    sha256: null,
    total: sum(rowTotals),
    rowTotals,
    columnTotals,
    emptyRows: parts.rowLabels.filter((_, i) => rowTotals[i] === 0),
    emptyColumns: parts.columnLabels.filter((_, j) => columnTotals[j] === 0),
    missing: null,
    ...parts,
  };
}

export function beforeWords(parts: SampleParts): ResultBeforeWords {
  return {
    schema: 'keepsum/result/1',
    tool: { name: 'keepsum', version: '0.1.0' },
    input: inputEcho(parts.input),
    plan: {
      statistic: parts.statistic.name,
      tail: 'upper',
      twoSidedRule: null,
      method: 'exact',
      methodAsked: 'auto',
      methodReason: '10 tables have these margins; exact work is forecast at 10 units',
      forecast: { engine: 'enumeration', workUnits: 10, tables: 10, tablesAreCounted: true, seconds: 0 },
      groups: null,
      event: null,
      reference: null,
      fixed: 'both',
      draws: null,
      seed: null,
      tableKey: 'a3c1',
      generator: null,
      blockSize: null,
      effort: 1e8,
      alpha: 0.05,
      confidence: 0.95,
      samplingConfidence: 0.99,
      ...parts.plan,
    },
    statistic: parts.statistic,
    pValues: parts.pValues,
    diagnostics: {
      smallestExpected: 6,
      shareBelowFive: 0,
      cochranAdvice: 'met',
      cochranSentence: "The expected counts meet Cochran's (1954) advice.",
      ...parts.diagnostics,
    },
    notes: parts.notes ?? [],
  };
}

/** A whole result: the parts, with sentence and methods in the words of the program. */
export function sample(parts: SampleParts): Result {
  const result = beforeWords(parts);
  return { ...result, sentence: sentenceFor(result), methods: methodsFor(result) };
}

type Facts = Partial<PValue> & Pick<PValue, 'p'>;

export const exactP = (facts: Facts): PValue => ({
  tail: 'upper',
  orderedBy: facts.statistic ?? 'pearson',
  method: 'exact',
  statistic: 'pearson',
  log10P: facts.p === null ? null : Math.log10(facts.p),
  strict: null,
  mid: null,
  tied: null,
  guaranteed: true,
  errors: [{ kind: 'rounding', relative: 2.2e-14 }],
  ...facts,
});

export const asymptoticP = (facts: Facts): PValue =>
  exactP({
    method: 'asymptotic',
    strict: facts.p,
    mid: facts.p,
    tied: 0,
    guaranteed: false,
    errors: [{ kind: 'approximation' }],
    ...facts,
  });

export function sampledP(
  counts: { atLeast: number; tied: number; draws: number; interval: [number, number] },
  facts: Partial<PValue> = {},
): PValue {
  const { atLeast, tied, draws, interval } = counts;
  const estimate = atLeast / draws;
  const p = (atLeast + 1) / (draws + 1);
  const hasSpread = atLeast > 0 && atLeast < draws;
  return exactP({
    method: 'sample',
    p,
    strict: (atLeast - tied) / draws,
    mid: (atLeast - tied / 2) / draws,
    tied: tied / draws,
    errors: [
      {
        kind: 'sampling',
        atLeast,
        draws,
        estimate,
        standardError: hasSpread ? Math.sqrt((estimate * (1 - estimate)) / draws) : null,
        ...(hasSpread ? {} : { reason: 'no-spread-seen' as const }),
        interval,
        confidence: 0.99,
      },
    ],
    ...facts,
  });
}

const sampled = { method: 'sample', methodAsked: 'auto', generator: 'tyche-i', blockSize: 4096 } as const;

const healing = [
  [8, 2],
  [1, 9],
];

/** Two groups typed in, exact, two-tailed by distance, with both one-tailed ones and the approximation beside. */
export const waldExact = sample({
  input: { rowLabels: ['treated', 'control'], columnLabels: ['healed', 'open'], counts: healing },
  plan: { tail: 'both', twoSidedRule: 'distance', groups: 'rows', event: 'healed', reference: 'control' },
  statistic: {
    name: 'wald',
    value: 4.427188724235731,
    event: 'healed',
    groups: [
      { label: 'treated', events: 8, size: 10, proportion: 0.8 },
      { label: 'control', events: 1, size: 10, proportion: 0.1 },
    ],
  },
  pValues: [
    exactP({
      tail: 'both',
      rule: 'distance',
      orderedBy: 'distance of wald from its centre',
      statistic: 'wald',
      p: 0.005477494641581329,
      strict: 0.00011907597046915932,
      mid: 0.002798285306025244,
      tied: 0.0053584186711121695,
      point: 0.0026792093355560848,
    }),
    exactP({ tail: 'upper', statistic: 'wald', p: 0.0027387473207906646 }),
    exactP({ tail: 'lower', statistic: 'wald', p: 0.9999404620147654 }),
    asymptoticP({
      tail: 'both',
      rule: 'distance',
      orderedBy: 'distance of wald from its centre',
      statistic: 'wald',
      p: 9.546919845238127e-6,
    }),
  ],
  diagnostics: {
    smallestExpected: 4.5,
    shareBelowFive: 0.5,
    cochranAdvice: 'not-met',
    cochranSentence:
      "The expected counts miss Cochran's (1954) advice for 2 x 2 tables: with a total of 20 to 40 and an expected count below 5, use the exact p.",
    tables: 10,
  },
  notes: [
    {
      code: 'asymptotic-differs',
      text: 'The asymptotic p is smaller than the exact one by more than a factor of 1.5: do not use it here.',
    },
  ],
});

/** Raw records with some missing; few draws, so that the error shows and the level lies inside the interval. */
export const pearsonSampled = sample({
  input: {
    source: {
      form: 'records',
      delimiter: 'semicolon',
      headerRow: true,
      rowsFrom: 'ward',
      columnsFrom: 'outcome',
      countFrom: null,
    },
    sha256: 'c0ffee'.repeat(10) + 'c0de',
    rowLabels: ['North ward', 'River ward', 'Old wing'],
    columnLabels: ['home', 'rehab', 'moved', 'stayed'],
    counts: [
      [9, 3, 2, 1],
      [4, 8, 3, 3],
      [3, 5, 6, 8],
    ],
    missing: { rule: 'drop', records: 61, missingRow: 2, missingColumn: 3, missingBoth: 1, dropped: 6 },
  },
  plan: {
    ...sampled,
    methodAsked: 'sample',
    methodReason: 'asked for; about 3.0e5 tables have these margins',
    draws: 1000,
    seed: 'spring-7',
  },
  statistic: { name: 'pearson', value: 14.160984848484851, degreesOfFreedom: 6 },
  pValues: [
    sampledP({ atLeast: 25, tied: 0, draws: 1000, interval: [0.014066074377788722, 0.04067217464897199] }),
    asymptoticP({ p: 0.02788866871183393, degreesOfFreedom: 6 }),
  ],
  diagnostics: {
    smallestExpected: 3,
    shareBelowFive: 2 / 3,
    cochranAdvice: 'not-met',
    cochranSentence: "More than a fifth of the cells expect fewer than 5, so Cochran's (1954) advice is not met.",
  },
});

/** A sparse table ordered by its own probability. */
export const probabilityExact = sample({
  input: {
    source: { form: 'cross-table', delimiter: 'tab', headerRow: true, labelColumn: true },
    sha256: '0f'.repeat(32),
    rowLabels: ['line A', 'line B', 'line C', 'line D', 'line E'],
    columnLabels: ['crack', 'dent', 'stain', 'warp', 'burr', 'chip', 'void'],
    counts: [
      [3, 0, 1, 0, 0, 0, 1],
      [0, 2, 0, 1, 0, 0, 0],
      [0, 0, 0, 2, 0, 1, 0],
      [1, 0, 0, 0, 2, 0, 0],
      [0, 0, 0, 0, 0, 1, 2],
    ],
  },
  plan: {
    methodReason: '2,747,230 tables have these margins; exact work is forecast at 96,153,050 units',
    forecast: { engine: 'enumeration', workUnits: 96_153_050, tables: 2_747_230, tablesAreCounted: true, seconds: 1.4 },
  },
  statistic: { name: 'probability', value: 17.273877711426568 },
  pValues: [
    exactP({
      statistic: 'probability',
      p: 0.005278523997011392,
      strict: 0.0016001435539250665,
      mid: 0.0034393337754682293,
      tied: 0.0036783804430863256,
      point: 3.1481123918098706e-8,
    }),
    exactP({ tail: 'lower', statistic: 'probability', p: 0.9983998564460749 }),
    asymptoticP({ p: 0.013128330292006742, degreesOfFreedom: 24 }),
  ],
  diagnostics: {
    smallestExpected: 0.17647058823529413,
    shareBelowFive: 1,
    cochranAdvice: 'not-met',
    cochranSentence: "Every cell expects fewer than 5, so Cochran's (1954) advice is not met.",
    tables: 2_747_230,
  },
});

/** A p below the smallest double: only its logarithm is known. */
export const underflow = sample({
  input: {
    rowLabels: ['sealed', 'vented'],
    columnLabels: ['rust', 'clean'],
    counts: [
      [912, 14],
      [9, 1065],
    ],
  },
  statistic: { name: 'pearson', value: 1908.5777620584793, degreesOfFreedom: 1 },
  pValues: [
    exactP({ p: null, log10P: -545.3454695873718, reason: 'underflow', strict: 0, mid: 0, tied: 0 }),
    asymptoticP({ p: null, log10P: -416.2, reason: 'underflow', degreesOfFreedom: 1 }),
  ],
  diagnostics: { smallestExpected: 426.423 },
});

/** One live column: nothing is left to chance. */
export const onlyOneTable = sample({
  input: {
    rowLabels: ['spring', 'summer', 'autumn'],
    columnLabels: ['seen', 'missed'],
    counts: [
      [3, 0],
      [5, 0],
      [2, 0],
    ],
  },
  statistic: { name: 'pearson', value: 0, degreesOfFreedom: 0 },
  pValues: [exactP({ p: 1, strict: 0, mid: 0.5, tied: 1, errors: [{ kind: 'rounding', relative: 0 }] })],
  diagnostics: { smallestExpected: 2 },
  notes: [
    { code: 'only-one-table', text: 'These margins allow one table only, so chance has nothing to decide and p is 1.' },
    {
      code: 'empty-lines',
      text: 'Left out because no unit falls into it (p is the same either way): column "missed".',
    },
  ],
});

/** An empty row, left out of the test and noted. */
export const emptyRow = sample({
  input: {
    source: { form: 'cross-table', delimiter: 'comma', headerRow: true, labelColumn: true, totalsLeftOut: ['row'] },
    sha256: '1d'.repeat(32),
    rowLabels: ['low dose', 'middle dose', 'high dose', 'not given'],
    columnLabels: ['none', 'mild', 'severe'],
    counts: [
      [6, 1, 3],
      [2, 7, 1],
      [1, 4, 5],
      [0, 0, 0],
    ],
  },
  statistic: { name: 'pearson', value: 11.833333333333334, degreesOfFreedom: 4 },
  pValues: [
    exactP({
      p: 0.019393093494837574,
      strict: 0.01653901547686496,
      mid: 0.017966054485851268,
      tied: 0.002854078017972613,
      point: 9.060565136420993e-5,
    }),
    asymptoticP({ p: 0.018634646635166053, degreesOfFreedom: 4 }),
  ],
  diagnostics: {
    smallestExpected: 3,
    shareBelowFive: 1,
    cochranAdvice: 'not-met',
    cochranSentence: "Every cell expects fewer than 5, so Cochran's (1954) advice is not met.",
    tables: 2035,
  },
  notes: [
    {
      code: 'empty-lines',
      text: 'Left out because no unit falls into it (p is the same either way): row "not given".',
    },
  ],
});

/** Two-tailed by doubling, sampled: both tails' counts stand in the error. Columns are the groups. */
export const doubledSampled = sample({
  input: {
    rowLabels: ['passed', 'failed'],
    columnLabels: ['new die', 'old die'],
    counts: [
      [11, 6],
      [3, 9],
    ],
  },
  plan: {
    ...sampled,
    tail: 'both',
    twoSidedRule: 'doubled',
    groups: 'columns',
    event: 'passed',
    reference: 'old die',
    draws: 5000,
    seed: '42',
  },
  statistic: {
    name: 'score',
    value: 2.1074597397392547,
    event: 'passed',
    groups: [
      { label: 'new die', events: 11, size: 14, proportion: 11 / 14 },
      { label: 'old die', events: 6, size: 15, proportion: 6 / 15 },
    ],
  },
  pValues: [
    exactP({
      tail: 'both',
      rule: 'doubled',
      method: 'sample',
      statistic: 'score',
      p: (2 * 204) / 5001,
      strict: (2 * 27) / 5000,
      mid: (2 * 115) / 5000,
      tied: (2 * 176) / 5000,
      errors: [
        {
          kind: 'sampling',
          atLeast: 203,
          draws: 5000,
          estimate: 0.0812,
          standardError: 0.005582231811739817,
          interval: [0.06750210937183326, 0.09667838358],
          confidence: 0.99,
          tails: { upper: 203, lower: 4973 },
        },
      ],
    }),
    sampledP(
      { atLeast: 203, tied: 176, draws: 5000, interval: [0.03375105468591663, 0.04833919178507137] },
      { statistic: 'score' },
    ),
    sampledP(
      { atLeast: 4973, tied: 176, draws: 5000, interval: [0.9914, 0.997] },
      { statistic: 'score', tail: 'lower' },
    ),
    asymptoticP({ tail: 'both', rule: 'doubled', orderedBy: 'score', statistic: 'score', p: 0.035077747980090244 }),
  ],
  diagnostics: { smallestExpected: 5.793103448275862 },
});

/** No draw reached the observed table. */
export const noneAsExtreme = sample({
  input: {
    rowLabels: ['clay', 'loam', 'sand'],
    columnLabels: ['beet', 'leek', 'rye'],
    counts: [
      [60, 12, 5],
      [9, 75, 14],
      [4, 11, 66],
    ],
  },
  plan: { ...sampled, draws: 100_000, seed: 'field' },
  statistic: { name: 'pearson', value: 239.24021442951113, degreesOfFreedom: 4 },
  pValues: [
    sampledP({ atLeast: 0, tied: 0, draws: 100_000, interval: [0, 5.2981770081923407e-5] }),
    asymptoticP({ p: 1.352e-50, degreesOfFreedom: 4 }),
  ],
  diagnostics: { smallestExpected: 21.95703125 },
});

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** Fourteen columns, long and wide labels, a total of five digits: folds into column groups. */
export const wideTable = sample({
  input: {
    source: { form: 'cross-table', delimiter: 'pipe', headerRow: true, labelColumn: true },
    sha256: 'ab'.repeat(32),
    rowLabels: ['returned because of a torn seam', 'returned because of the colour', '返品（理由なし）', 'kept'],
    columnLabels: [...months, 'outlet, all year', 'staff shop, all year'],
    counts: [
      [28, 26, 31, 32, 35, 33, 42, 35, 34, 21, 18, 29, 35, 23],
      [172, 191, 187, 190, 187, 192, 223, 218, 224, 210, 201, 186, 191, 204],
      [4, 4, 5, 6, 2, 5, 3, 3, 2, 2, 0, 6, 3, 3],
      [877, 898, 915, 901, 953, 905, 904, 937, 905, 861, 866, 891, 895, 891],
    ],
  },
  plan: {
    ...sampled,
    draws: 20_000,
    seed: 'shop',
    forecast: { engine: 'enumeration', workUnits: 4e39, tables: 7e37, tablesAreCounted: false, seconds: 5e31 },
  },
  statistic: { name: 'pearson', value: 40.04123063017694, degreesOfFreedom: 39 },
  pValues: [
    sampledP({ atLeast: 8375, tied: 0, draws: 20_000, interval: [0.40975936055895024, 0.42777943192498635] }),
    asymptoticP({ p: 0.42376401831201, degreesOfFreedom: 39 }),
  ],
  diagnostics: { smallestExpected: 3.274723887661723, shareBelowFive: 0.25, cochranAdvice: 'not-met' },
});

/** The approximation asked for by name, the likelihood ratio, one group label that tries to run a formula. */
export const asymptoticHeadline = sample({
  input: {
    rowLabels: ['=SUM(A1)', '@night'],
    columnLabels: ['yes', 'no', 'unsure'],
    counts: [
      [40, 31, 12],
      [22, 38, 21],
    ],
  },
  plan: { method: 'asymptotic', methodAsked: 'asymptotic', methodReason: 'asked for; 1,200 tables have these margins' },
  statistic: { name: 'likelihood-ratio', value: 8.41, degreesOfFreedom: 2 },
  pValues: [asymptoticP({ statistic: 'likelihood-ratio', p: 0.0149, degreesOfFreedom: 2 })],
  diagnostics: { smallestExpected: 16.3 },
});

/** Labels that try everything: terminal escapes, line feeds, reversed reading, html, markdown, formulas. */
export const hostileLabels = sample({
  input: {
    rowLabels: ['\u001b[31mred\u0007', 'a\nb|c', '<script>alert(1)</script>'],
    columnLabels: ['=cmd|calc', '\u202egnp.exe', '*bold* [x](http://x.example)', ''],
    counts: [
      [5, 1, 2, 3],
      [1, 6, 2, 2],
      [0, 1, 7, 4],
    ],
  },
  plan: { ...sampled, draws: 1000, seed: "it's\u001b[2J" },
  statistic: { name: 'pearson', value: 14.2, degreesOfFreedom: 6 },
  pValues: [sampledP({ atLeast: 25, tied: 2, draws: 1000, interval: [0.014, 0.0407] })],
  notes: [{ code: 'look-alike', text: 'A label holds a reversing character: \u202egnp.exe' }],
});

export const sampleResults: Readonly<Record<string, Result>> = {
  waldExact,
  pearsonSampled,
  probabilityExact,
  underflow,
  onlyOneTable,
  emptyRow,
  doubledSampled,
  noneAsExtreme,
  wideTable,
  asymptoticHeadline,
  hostileLabels,
};
