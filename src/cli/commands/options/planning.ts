// Options that become the plan: names as in PlanOptions, so that they pass through unchanged.
import {
  anyText,
  betweenZeroAndOne,
  oneOf,
  wholeNumber,
  withNames,
  type CheckValue,
} from '../../arguments/check-value.js';
import { toggle, valued } from '../../arguments/option.js';
import { standardEffort } from '../../../null/forecast.js';
import { standardMostDraws, standardRelativeError } from '../../../plan/draws.js';
import { orderedSides } from '../../../order/questions.js';
import { fixedSides, outcomeOrders } from '../../../plan/design.js';
import { methods, tails, twoSidedRules, type Shard } from '../../../plan/plan.js';
import { usageProblem } from '../../../problem/problem.js';
import { pairedNames } from '../../../statistic/paired.js';
import { statisticNamed, statisticNames } from '../../../statistic/registry.js';
import { stratifiedNames } from '../../../statistic/stratified.js';
import { isModulePath } from '../module-path.js';
import { either } from './words.js';

const sides = ['rows', 'columns'] as const;

const orAuto =
  (check: CheckValue<number>): CheckValue<number | 'auto'> =>
  (text, flag) =>
    text === 'auto' ? 'auto' : check(text, flag);

/** "3/16". */
const shardPart: CheckValue<Shard> = (text, flag) => {
  const match = /^(\d{1,6})\/(\d{1,6})$/.exec(text);
  const [index, of] = [Number(match?.[1]), Number(match?.[2])];
  if (index >= 1 && index <= of) return { index, of };
  throw usageProblem({
    code: 'not-a-shard',
    message: `"${text}" names no part`,
    place: flag,
    hint: `write ${flag} 3/16 for the third of sixteen parts`,
  });
};

export const planning = {
  statistic: valued(
    'The test',
    'NAME',
    withNames([...statisticNames, ...pairedNames, ...stratifiedNames], (text) =>
      isModulePath(text) || pairedNames.includes(text) || stratifiedNames.includes(text)
        ? text
        : statisticNamed(text).name,
    ),
    `${either(statisticNames)} (pearson), or one of your own: ./mine.mjs; over strata ${either(stratifiedNames)} (by their shape)`,
  ),
  paired: toggle(
    'The test',
    `rows and columns are two answers of the same units, with the same levels; its statistics: ${either(pairedNames)} (mcnemar; more than two levels: bowker)`,
  ),
  tail: valued('The test', 'TAIL', oneOf(tails), `${either(tails)} (upper; for wald, score and trend both)`),
  twoSidedRule: valued('The test', 'RULE', oneOf(twoSidedRules), `for both tails: ${either(twoSidedRules)} (distance)`),
  fixed: valued('The test', 'SIDE', oneOf(fixedSides), `what the study held fixed: ${either(fixedSides)} (both)`),
  outcomeOrder: valued(
    'The test',
    'ORDER',
    oneOf(outcomeOrders),
    `with rows or columns fixed, what makes a 2x2 outcome extreme: ${either(outcomeOrders)} (statistic)`,
  ),
  nuisanceRisk: valued(
    'The test',
    'GAMMA',
    betweenZeroAndOne('1e-6'),
    'likewise, look for the common proportion in an interval only, and add this to p (0)',
  ),
  nullValue: valued(
    'The test',
    'MEASURE=VALUE',
    anyText,
    'of a 2x2 table, test against this instead of none: odds-ratio=2; with rows or columns fixed also difference=-0.1, ratio=1.25; two values for equivalence: difference=-0.1,0.1',
  ),
  groups: valued('The test', 'SIDE', oneOf(sides), `of a 2x2 table, what is compared: ${either(sides)} (rows)`),
  event: valued('The test', 'LABEL', anyText, 'the outcome whose proportions are compared (the first)'),
  reference: valued('The test', 'LABEL', anyText, 'the group compared with (the second)'),
  rowScores: valued(
    'The test',
    'SCORES',
    anyText,
    'for trend, one for each row: 0,1,2.5 or the word midranks (1,2,3 and so on); over strata also pooled-midranks (midranks within each)',
  ),
  columnScores: valued('The test', 'SCORES', anyText, 'the same of the columns'),
  ordered: valued(
    'The test',
    'SIDES',
    oneOf(orderedSides),
    `lines that stand in order: ${either(orderedSides)}; adds the tests that use it`,
  ),
  compare: valued(
    'The test',
    'SIDE',
    oneOf(sides),
    'which of them differ: every two rows, or columns, adjusted over all',
  ),
  control: valued('The test', 'LABEL', anyText, 'with --compare, each against this line only'),
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
  bootstrap: valued(
    'How p is found',
    'N',
    wholeNumber(100, 1e6, '2000'),
    "resampled tables for an interval of Cramer's V of a larger table (none)",
  ),
  shard: valued(
    'How p is found',
    'K/N',
    shardPart,
    'only part K of N: every Nth block of draws, or of a batch every Nth table; keepsum merge pools them',
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
  cells: toggle('The report', 'adjust the p of every cell, however long (unasked: where that is cheap)'),
  noCells: toggle('The report', 'nothing about single cells'),
  alpha: valued('The report', 'LEVEL', betweenZeroAndOne('0.05'), 'the level that p is compared with in words (0.05)'),
  confidence: valued('The report', 'LEVEL', betweenZeroAndOne('0.95'), 'of intervals for effects (0.95)'),
};
