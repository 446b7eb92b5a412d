// The options of `keepsum test`, in the order of its help.
import { anyText, betweenZeroAndOne, oneOf, wholeNumber, type CheckValue } from '../arguments/check-value.js';
import { toggle, valued } from '../arguments/option.js';
import { standardEffort } from '../../null/forecast.js';
import { standardMostDraws, standardRelativeError } from '../../plan/draws.js';
import { methods, tails, twoSidedRules } from '../../plan/plan.js';
import { formatNames } from '../../report/formats.js';
import { statisticNamed, statisticNames } from '../../statistic/registry.js';
import { isModulePath } from './module-path.js';
import { debugOption, helpOption, outputOption } from './shared-options.js';

const delimiters = ['comma', 'semicolon', 'tab', 'pipe'] as const;
const answers = ['yes', 'no', 'detect'] as const;
const missingRules = ['fail', 'drop', 'level'] as const;
const sides = ['rows', 'columns'] as const;

const orAuto =
  (check: CheckValue<number>): CheckValue<number | 'auto'> =>
  (text, flag) =>
    text === 'auto' ? 'auto' : check(text, flag);

const either = (names: readonly string[]): string => names.join(', ');

export const reading = {
  rowLabels: valued(
    'Reading the table',
    'LABELS',
    anyText,
    'labels of the rows, separated by commas; "a, b" holds a comma',
  ),
  columnLabels: valued('Reading the table', 'LABELS', anyText, 'labels of the columns, likewise'),
  rows: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'raw records: the column of the file that gives the row of each',
  ),
  columns: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'the one that gives the column; both by header name or number',
  ),
  count: valued('Reading the table', 'COLUMN', anyText, 'the one that says how many times a record counts (once)'),
  missing: valued(
    'Reading the table',
    'RULE',
    oneOf(missingRules),
    `records that lack a value: ${either(missingRules)} (fail)`,
  ),
  rowOrder: valued('Reading the table', 'LABELS', anyText, 'the rows in this order (as they appear)'),
  columnOrder: valued('Reading the table', 'LABELS', anyText, 'the columns in this order (as they appear)'),
  headerRow: valued(
    'Reading the table',
    'ANSWER',
    oneOf(answers),
    `does the first line hold labels? ${either(answers)} (detect)`,
  ),
  labelColumn: valued(
    'Reading the table',
    'ANSWER',
    oneOf(answers),
    `does the first column hold labels? ${either(answers)} (detect)`,
  ),
  delimiter: valued('Reading the table', 'NAME', oneOf(delimiters), `${either(delimiters)} (detected)`),
  dropTotals: toggle('Reading the table', 'leave out a row or column of totals'),
  keepTotals: toggle('Reading the table', 'count what looks like totals as data'),
};

export const planning = {
  statistic: valued(
    'The test',
    'NAME',
    (text) => (isModulePath(text) ? text : statisticNamed(text).name),
    `${either(statisticNames)} (pearson), or one of your own: ./mine.mjs`,
  ),
  tail: valued('The test', 'TAIL', oneOf(tails), `${either(tails)} (upper; for wald, score and trend both)`),
  twoSidedRule: valued('The test', 'RULE', oneOf(twoSidedRules), `for both tails: ${either(twoSidedRules)} (distance)`),
  groups: valued('The test', 'SIDE', oneOf(sides), `for wald and score, what is compared: ${either(sides)} (rows)`),
  event: valued('The test', 'LABEL', anyText, 'the outcome whose proportions are compared (the first)'),
  reference: valued('The test', 'LABEL', anyText, 'the group compared with (the second)'),
  rowScores: valued(
    'The test',
    'SCORES',
    anyText,
    'for trend, one for each row: 0,1,2.5 or the word midranks (1,2,3 and so on)',
  ),
  columnScores: valued('The test', 'SCORES', anyText, 'the same of the columns'),
  lambda: valued('The test', 'NUMBER', anyText, 'for power-divergence, its exponent: a decimal or a fraction (2/3)'),
  method: valued(
    'How p is found',
    'NAME',
    oneOf(methods),
    `${either(methods)} (auto: exact where that is cheap, else sample)`,
  ),
  draws: valued(
    'How p is found',
    'N',
    orAuto(wholeNumber(1, 1e12, '100000')),
    'random tables to draw, or auto: until p is settled against --alpha (auto)',
  ),
  mostDraws: valued(
    'How p is found',
    'N',
    wholeNumber(1000, 1e12, '1e7'),
    `with auto, never more than these (${standardMostDraws.toExponential().replace('e+', 'e')})`,
  ),
  relativeError: valued(
    'How p is found',
    'SHARE',
    betweenZeroAndOne('0.02'),
    `with auto, enough when p is known this well (${standardRelativeError})`,
  ),
  samplingRisk: valued(
    'How p is found',
    'RISK',
    betweenZeroAndOne('0.0001'),
    'with auto, probability that an interval ever errs (alpha / 500)',
  ),
  seed: valued('How p is found', 'TEXT', anyText, 'makes the draws repeatable (one is made and shown)'),
  effort: valued(
    'How p is found',
    'UNITS',
    wholeNumber(1, Infinity, '1e9'),
    `most exact work that is allowed, in steps (${standardEffort.toExponential().replace('e+', 'e')})`,
  ),
  samplingConfidence: valued(
    'How p is found',
    'LEVEL',
    betweenZeroAndOne('0.99'),
    'of the interval around a sampled p (0.99)',
  ),
  alpha: valued('The report', 'LEVEL', betweenZeroAndOne('0.05'), 'the level that p is compared with in words (0.05)'),
  confidence: valued('The report', 'LEVEL', betweenZeroAndOne('0.95'), 'of intervals for effects (0.95)'),
};

const reporting = {
  format: valued('The report', 'NAME', oneOf(formatNames), `${either(formatNames)} (text)`),
  output: outputOption,
  rawCsv: toggle('The report', 'leave text cells of CSV output that a spreadsheet would run as a formula as they are'),
  width: valued(
    'The report',
    'N',
    wholeNumber(40, 1000, '100'),
    'characters in a line of text (as wide as the terminal, else 80)',
  ),
  color: toggle('The report', 'coloured text even where it goes to a file or a pipe'),
  noColor: toggle('The report', 'no coloured text'),
  threads: valued(
    'How p is found',
    'N',
    wholeNumber(1, 256, '2'),
    'threads for long sampling; the digits are the same (all)',
  ),
  noProgress: toggle('The report', 'no line on standard error that says how far a long run is'),
  quiet: toggle('The report', 'no remarks on standard error', 'q'),
};

export const testOptions = { ...reading, ...planning, ...reporting, debug: debugOption, help: helpOption };
