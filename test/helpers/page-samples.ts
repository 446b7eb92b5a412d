// A page of every kind, made by the program itself, for the tests in a browser.
import { readFileSync } from 'node:fs';
import { analyse } from '../../src/analyse.js';
import { readCrossTable } from '../../src/input/cross-table.js';
import { linesPage } from '../../src/batch/lines-page.js';
import type { CompactLine } from '../../src/batch/lines.js';
import { planPower } from '../../src/plan-power.js';
import { powerHtml } from '../../src/report/html/power.js';
import { htmlReport } from '../../src/report/html/report.js';
import { selfCheckHtml } from '../../src/report/html/self-check.js';
import type { Result } from '../../src/result/result.js';
import { selfCheck, shippedCases } from '../../src/self-check.js';
import { hostileLabels, wideTable } from './sample-results.js';

const demo = (name: string) => readCrossTable(readFileSync(`fixtures/demo/${name}`), { sourceName: name });
const drawn = { nullSummary: true, seed: 'page' };

const healing = {
  counts: [
    [8, 2],
    [1, 9],
  ],
  rowLabels: ['treated', 'control'],
  columnLabels: ['healed', 'open'],
};
const scripts = {
  counts: [
    [7, 3, 5],
    [2, 9, 4],
    [6, 1, 8],
  ],
  rowLabels: [
    '病院の外来',
    'مستشفى الرمل (شرق)',
    'an answer that goes on for much longer than any heading of a table should, as some surveys have it',
  ],
  columnLabels: ['治癒した', 'לא נרפא', 'Besserung nach mehrwöchiger Behandlung'],
};

const twoByTwo = (): Promise<Result> => analyse(healing, { ...drawn, statistic: 'score' });
const withCells = (): Promise<Result> => analyse(demo('orchid-forms.tsv'), { ...drawn, cells: true });
const strata = (): Promise<Result> => analyse(demo('leaking-seals.csv'), drawn);
const pairs = (): Promise<Result> => analyse(demo('knee-before-after.csv'), { seed: 'page', paired: true });
const sampled = (): Promise<Result> =>
  analyse(demo('lung-lesions.csv'), { ...drawn, method: 'sample', draws: 2000, ordered: 'both' });
const letters = (): Promise<Result> => analyse(scripts, { ...drawn, method: 'sample', draws: 500, cells: true });

const makers = {
  'a 2x2 table': async () => htmlReport([await twoByTwo()]),
  'a table with cells': async () => htmlReport([await withCells()]),
  strata: async () => htmlReport([await strata()]),
  pairs: async () => htmlReport([await pairs()]),
  'a sampled table': async () => htmlReport([await sampled()]),
  'a wide table': async () => htmlReport([wideTable]),
  'labels that act, run on, or come from the right': async () => htmlReport([hostileLabels, await letters()]),
  'many results': async () => htmlReport(await Promise.all([twoByTwo(), withCells(), strata(), pairs()])),
  'lines of a batch': async () => {
    const texts = readFileSync('fixtures/demo/shift-results.ndjson', 'utf8').trim().split('\n');
    const error = {
      code: 'c',
      message: 'a row of 3 counts after rows of 2',
      place: 'tables.ndjson:7',
      hint: 'write 0',
    };
    return linesPage(
      [
        ...texts.map((text) => ({ kind: 'compact' as const, line: JSON.parse(text) as CompactLine })),
        { kind: 'error', line: { key: 'e', error } },
      ],
      '0.0.0',
    );
  },
  'a planned study': async () => {
    const groups = [
      { label: 'treated', probabilities: [0.7] },
      { label: 'control', probabilities: [0.4] },
    ];
    const sizes = [20, 30, 40].map((size) => [size, size]);
    return powerHtml(await planPower({ groups, sizes }));
  },
  'a self check': async () => {
    const cases = (await shippedCases()).filter((_, k) => k % 12 === 0);
    const machine = { runtime: 'Node.js', engine: 'V8', system: 'linux', architecture: 'x64' };
    return selfCheckHtml(await selfCheck(cases, machine));
  },
};

export type PageKind = keyof typeof makers;
export const pageKinds = Object.keys(makers) as PageKind[];
export const pageOf = (kind: PageKind): Promise<string> => makers[kind]();
