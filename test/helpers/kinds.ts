// A small table for every kind of analysis, for tests of the words that each of them gets. Every table is invented.
import type { ReadTable } from '../../src/input/read-table.js';
import type { StrataParts } from '../../src/input/strata.js';
import type { PlanOptions } from '../../src/plan/plan.js';
import { makeTable, type TableParts } from '../../src/table/table.js';

export interface Kind {
  readonly name: string;
  readonly table: TableParts | StrataParts | ReadTable;
  readonly options: PlanOptions;
  /** What its sentence says of the effect, where one is worked out. */
  readonly effect?: RegExp;
}

const healing = { counts: [[8, 2], [1, 9]], rowLabels: ['treated', 'control'], columnLabels: ['healed', 'open'] }; // prettier-ignore
const soils = { counts: [[9, 3, 2], [1, 7, 6], [2, 4, 9]] }; // prettier-ignore
const pairs = { counts: [[20, 5], [12, 30]], rowLabels: ['yes', 'no'], columnLabels: ['yes', 'no'] }; // prettier-ignore
const raters = { counts: [[9, 2, 1], [4, 8, 3], [1, 2, 7]] }; // prettier-ignore
const sites = { strata: [{ label: 'north', counts: healing.counts }, { label: 'south', counts: [[4, 3], [2, 7]] }] }; // prettier-ignore
const wide = { counts: [[8, 2, 5, 1], [1, 9, 3, 4]], rowLabels: ['返品（理由なし）'.repeat(4), 'kept '.repeat(20)] }; // prettier-ignore

const litters: ReadTable = {
  table: makeTable({ counts: [[7, 2], [3, 6]] }), // prettier-ignore
  source: { form: 'library' },
  sha256: null,
  missing: null,
  notes: [],
  clusters: [
    { label: '1', row: 0, counts: [4, 1] },
    { label: '2', row: 0, counts: [3, 1] },
    { label: '3', row: 1, counts: [1, 3] },
    { label: '4', row: 1, counts: [2, 3] },
  ],
};

const ofDifference = /percentage points, 95% interval -?[\d.]+ to [\d.]+/;

export const kinds: readonly Kind[] = [
  { name: 'a 2x2 table', table: healing, options: {}, effect: /odds ratio .* is 27.3 \(95% interval 2.06 to 1,770\)/ },
  { name: 'two groups', table: healing, options: { statistic: 'wald' }, effect: ofDifference },
  { name: 'fixed rows', table: healing, options: { statistic: 'score', fixed: 'rows' }, effect: ofDifference },
  {
    name: 'a stated value',
    table: healing,
    options: { fixed: 'rows', nullValue: 'difference=-0.1', tail: 'upper' },
    effect: ofDifference,
  },
  { name: 'equivalence', table: healing, options: { nullValue: 'odds-ratio=0.5,2' }, effect: /odds ratio .* is 27.3/ },
  { name: 'a larger table', table: soils, options: {}, effect: /tau \(columns from rows\) is 0.\d+ \(95% interval/ },
  {
    name: 'draws',
    table: soils,
    options: { method: 'sample', draws: 1000, seed: 'a', bootstrap: 100 },
    effect: /Cramer's V without bias is 0.\d+ \(95% interval/,
  },
  { name: 'draws until settled', table: soils, options: { method: 'sample', seed: 'a', mostDraws: 2000 } },
  { name: 'an approximation', table: soils, options: { method: 'asymptotic' } },
  { name: 'an order', table: soils, options: { ordered: 'both' }, effect: /gamma is 0.\d+ \(95% interval/ },
  { name: 'a trend', table: soils, options: { statistic: 'trend' }, effect: /gamma is 0.\d+ \(95% interval/ },
  { name: 'lines compared', table: soils, options: { compare: 'rows' } },
  { name: 'wide labels', table: wide, options: { cells: true } },
  { name: 'pairs of two levels', table: pairs, options: { paired: true }, effect: ofDifference },
  { name: 'pairs of more levels', table: raters, options: { paired: true }, effect: ofDifference },
  {
    name: 'raters',
    table: raters,
    options: { paired: true, statistic: 'kappa' },
    effect: /kappa is .* \(95% interval/,
  },
  { name: 'strata', table: sites, options: {}, effect: /common odds ratio .* \(95% limits/ },
  { name: 'strata drawn', table: sites, options: { statistic: 'any-association', method: 'sample', seed: 'a' } },
  { name: 'clusters', table: litters, options: {} },
  {
    name: 'impossible cells',
    table: {
      counts: [[0, 8, 3], [6, 0, 9], [4, 7, 0]], // prettier-ignore
      impossible: [[true, false, false], [false, true, false], [false, false, true]], // prettier-ignore
    },
    options: {},
  },
  { name: 'one table only', table: { counts: [[3, 0], [5, 0]] }, options: {} }, // prettier-ignore
];
