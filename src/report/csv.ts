// One row per p-value, the headline first, under published columns: for spreadsheets and data frames.
import { shown } from '../result/label-words.js';
import { statedText } from '../result/stated-words.js';
import type { ResultBeforeWords } from '../result/describe.js';
import type { PValue } from '../result/result.js';
import type { Format } from './format.js';

type Cell = string | number | boolean | null | undefined;

interface Column {
  readonly name: string;
  readonly words: string;
  cell(p: PValue, result: ResultBeforeWords): Cell;
}

type ErrorOf<Kind> = Extract<PValue['errors'][number], { kind: Kind }>;

const rounding = (p: PValue): ErrorOf<'rounding'> | undefined => p.errors.find((error) => error.kind === 'rounding');
/** What drawing left unknown, of a fixed number of draws or until settled. */
const sampling = (p: PValue): ErrorOf<'sampling'> | ErrorOf<'sequential'> | undefined =>
  p.errors.find((error) => error.kind === 'sampling' || error.kind === 'sequential');
const sequential = (p: PValue): ErrorOf<'sequential'> | undefined =>
  p.errors.find((error) => error.kind === 'sequential');
const bracket = (p: PValue): ErrorOf<'bracket'> | undefined => p.errors.find((error) => error.kind === 'bracket');
/** A bracket holds p for certain. */
function levelOf(p: PValue): number | undefined {
  const error = sampling(p);
  if (error === undefined) return bracket(p) === undefined ? undefined : 1;
  return error.kind === 'sampling' ? error.confidence : error.level;
}
const standardErrorOf = (error: ReturnType<typeof sampling>): number | null | undefined =>
  error?.kind === 'sampling' ? error.standardError : undefined;
const maximum = (p: PValue): ErrorOf<'nuisance-maximum'> | undefined =>
  p.errors.find((error) => error.kind === 'nuisance-maximum');
const isHeadlineStatistic = (p: PValue, { statistic }: ResultBeforeWords): boolean => p.statistic === statistic.name;

/** The published columns, in order; names as in the JSON result. An empty cell says: does not apply, or not known. */
export const csvColumns: readonly Column[] = [
  { name: 'headline', words: 'true for the p that was asked for', cell: (p, { pValues }) => p === pValues[0] },
  { name: 'statistic', words: 'the statistic that p is of', cell: (p) => p.statistic },
  {
    name: 'value',
    words: 'its value; infinity and -infinity as words',
    cell: (p, result) => (isHeadlineStatistic(p, result) ? result.statistic.value : p.value),
  },
  { name: 'tail', words: 'upper, lower or both', cell: (p) => p.tail },
  { name: 'rule', words: 'two-sided rule, for both tails', cell: (p) => p.rule },
  { name: 'orderedBy', words: 'what makes a table as extreme as the observed one', cell: (p) => p.orderedBy },
  { name: 'method', words: 'exact, sample, asymptotic or unconditional', cell: (p) => p.method },
  { name: 'p', words: 'the p-value; empty with a reason when below the smallest double', cell: (p) => p.p },
  { name: 'log10P', words: 'its decimal logarithm', cell: (p) => p.log10P },
  { name: 'reason', words: 'why p is empty', cell: (p) => p.reason },
  { name: 'strict', words: 'p with ties left out', cell: (p) => p.strict },
  { name: 'mid', words: 'p with ties counted by half', cell: (p) => p.mid },
  { name: 'tied', words: 'probability of a tie', cell: (p) => p.tied },
  { name: 'point', words: 'probability of the observed table', cell: (p) => p.point },
  { name: 'degreesOfFreedom', words: 'of the approximation', cell: (p) => p.degreesOfFreedom },
  {
    name: 'guaranteed',
    words: 'true when p <= a happens at most with probability a by chance',
    cell: (p) => p.guaranteed,
  },
  { name: 'relativeError', words: 'bound on the rounding of an exact p', cell: (p) => rounding(p)?.relative },
  { name: 'atLeast', words: 'draws at least as extreme', cell: (p) => sampling(p)?.atLeast },
  { name: 'atLeastUpper', words: 'the same in the upper tail, rule doubled', cell: (p) => sampling(p)?.tails?.upper },
  { name: 'atLeastLower', words: 'the same in the lower tail, rule doubled', cell: (p) => sampling(p)?.tails?.lower },
  { name: 'draws', words: 'draws made', cell: (p) => sampling(p)?.draws },
  { name: 'estimate', words: 'share of draws at least as extreme', cell: (p) => sampling(p)?.estimate },
  { name: 'standardError', words: 'of the estimate', cell: (p) => standardErrorOf(sampling(p)) },
  {
    name: 'intervalLower',
    words: 'interval of the estimate, or the certified bracket of p',
    cell: (p) => sampling(p)?.interval[0] ?? bracket(p)?.lower,
  },
  {
    name: 'intervalUpper',
    words: 'interval of the estimate, or the certified bracket of p',
    cell: (p) => sampling(p)?.interval[1] ?? bracket(p)?.upper,
  },
  { name: 'intervalConfidence', words: 'its level; 1 for a bracket', cell: levelOf },
  {
    name: 'stoppedBecause',
    words: 'why drawing ended, where it went on until settled',
    cell: (p) => sequential(p)?.stoppedBecause,
  },
  { name: 'risk', words: 'probability that the interval errs at any look, in p', cell: (p) => sequential(p)?.risk },
  { name: 'groups', words: 'rows or columns, for two groups', cell: (_, { plan }) => plan.groups },
  { name: 'event', words: 'the event whose proportions are compared', cell: (_, { statistic }) => statistic.event },
  { name: 'first', words: 'the first group', cell: (_, { statistic }) => statistic.groups?.[0].label },
  { name: 'second', words: 'the group it is compared with', cell: (_, { statistic }) => statistic.groups?.[1].label },
  { name: 'rows', words: 'rows of the table', cell: (_, { input }) => input.rowLabels.length },
  { name: 'columns', words: 'columns of the table', cell: (_, { input }) => input.columnLabels.length },
  { name: 'total', words: 'sum of its counts', cell: (_, { input }) => input.total },
  { name: 'seed', words: 'seed of the draws', cell: (_, { plan }) => plan.seed },
  { name: 'version', words: 'version of keepsum', cell: (_, { tool }) => tool.version },
  { name: 'fixed', words: 'what the study held fixed', cell: (_, { plan }) => plan.fixed },
  { name: 'nuisance', words: 'the proportion at which an unconditional p is largest', cell: (p) => p.nuisance?.value },
  {
    name: 'nuisanceSecond',
    words: 'with the total fixed, that of the first column',
    cell: (p) => p.nuisance?.second,
  },
  {
    name: 'maximumError',
    words: 'how far an unconditional p can lie above the true maximum, relative',
    cell: (p) => maximum(p)?.relative,
  },
  {
    name: 'nullValue',
    words: 'what p is tested against, where that is not none: difference=-0.1',
    cell: (p) => (p.nullValue === undefined ? undefined : statedText(p.nullValue)),
  },
];

export const csv: Format = {
  words: 'one row for each p-value, for spreadsheets',
  write(result, { rawCsv }) {
    return csvLine(csvColumns.map((column) => column.name)) + csvRows(result, rawCsv).map(csvLine).join('');
  },
};

/** A row for each p-value: one cell for each of the columns. */
export const csvRows = (result: ResultBeforeWords, raw: boolean): string[][] =>
  result.pValues.map((p) => csvColumns.map((column) => cellText(column.cell(p, result), raw)));

export const csvLine = (cells: readonly string[]): string => `${cells.join(',')}\n`;

/** A cell as it stands in a row; `raw` leaves what a spreadsheet would run. */
export function cellText(cell: Cell, raw: boolean): string {
  if (cell === null || cell === undefined) return '';
  if (typeof cell !== 'string') return String(cell);
  return csvField(raw ? cell : disarmed(cell));
}

// What spreadsheets take for the beginning of a formula, the full-width forms of some of them included.
const formulaStart = /^[=+\-@\t\r\n\uff1d\uff0b\uff0d\uff20]/;

/** A text cell that no spreadsheet runs and no terminal obeys. Our word for an infinite number stays a number. */
export const disarmed = (text: string): string =>
  (formulaStart.test(text) && text !== '-infinity' ? "'" : '') + shown(text);

/** Quoted where CSV needs it (RFC 4180). */
const csvField = (text: string): string => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
