// The plan for a table with impossible cells: few wishes make sense there, and every other one is refused.
import { standardEffort } from '../null/forecast.js';
import { groupedDigits } from '../numeric/digit-groups.js';
import { dataProblem, effortProblem, usageProblem } from '../problem/problem.js';
import { quasiStatistics, type QuasiStatistic } from '../statistic/quasi.js';
import { chanceOf, levelsOf, refuseEmptySeed } from './footing.js';
import { methods, type ChosenMethod, type Method, type Plan, type PlanOptions } from './plan.js';
import { oneOf, positive, wholeNumber } from './settings.js';

/** Tables that a chain compares, unless told. */
export const standardChainTables = 100_000;
/** Steps of listing that `auto` tries before it takes a chain. */
export const stepsToTry = 3e6;

/** A key names the table; a summary for pictures is left out here, as it is where there is none. */
const read = [
  'statistic',
  'tail',
  'method',
  'draws',
  'seed',
  'effort',
  'alpha',
  'confidence',
  'samplingConfidence',
  'tableKey',
  'nullSummary',
];

export interface QuasiWishes {
  readonly statistic: QuasiStatistic;
  readonly asked: Method;
  readonly effort: number;
  /** Steps of listing that may be taken. */
  readonly steps: number;
}

/** @throws Problem (usage): `impossible-cells`, `unknown-value`. */
export function quasiWishes(options: PlanOptions): QuasiWishes {
  for (const [name, value] of Object.entries(options)) {
    if (value === undefined || value === false || read.includes(name)) continue;
    throw refused(`--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`);
  }
  if (options.tail !== undefined && options.tail !== 'upper') throw refused(`--tail ${options.tail}`);
  const { statistic } = options;
  const found = quasiStatistics.find((name) => name === (statistic ?? 'pearson'));
  if (found === undefined) throw refused('--statistic');
  const asked = oneOf(options.method, 'auto', methods, '--method');
  const effort = positive(options.effort, standardEffort, '--effort');
  return { statistic: found, asked, effort, steps: asked === 'exact' ? effort : Math.min(effort, stepsToTry) };
}

const refused = (place: string): Error =>
  usageProblem({
    code: 'impossible-cells',
    message: 'this table has cells declared impossible (-), for which that is not worked out',
    place,
    hint: 'with impossible cells: --statistic pearson or likelihood-ratio, upper tail; write 0 where a cell was merely empty',
  });

/** @param tables how many there are; undefined where they were not all listed. @param moves undefined where there are too many. */
export function planQuasi(
  options: PlanOptions,
  { statistic, asked, effort, steps }: QuasiWishes,
  tables: number | undefined,
  moves: number | undefined,
): Plan {
  const listed = tables !== undefined;
  if (asked === 'exact' && !listed) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: `listing the tables takes more than ${steps} steps`,
      place: '--method exact',
      hint: 'use --method sample, or raise the bound with --effort',
    });
  }
  const method: ChosenMethod = asked !== 'auto' ? asked : listed ? 'exact' : 'sample';
  if (method === 'sample' && moves === undefined) {
    throw dataProblem({
      code: 'too-many-moves',
      message: 'more than 50,000 moves are needed to connect the tables with these impossible cells',
      hint: 'use --method asymptotic',
    });
  }
  if (method === 'sample' && options.draws === 'auto') {
    throw usageProblem({
      code: 'chain-of-fixed-length',
      message: 'a chain has a fixed number of tables: no stopping rule is known to hold for it',
      place: '--draws auto',
      hint: `for example --draws ${standardChainTables}`,
    });
  }
  refuseEmptySeed(options);
  const sampled = method === 'sample';
  const reason = listed
    ? `${groupedDigits(tables)} ${tables === 1 ? 'table has' : 'tables have'} these margins`
    : `listing all tables takes more than ${steps} steps`;
  return Object.freeze({
    statistic,
    tail: 'upper',
    twoSidedRule: null,
    method,
    methodAsked: asked,
    methodReason: asked === 'auto' ? reason : `asked for; ${reason}`,
    forecast: Object.freeze({
      engine: sampled ? 'chain' : 'enumeration',
      workUnits: steps,
      tables: tables ?? 0,
      tablesAreCounted: listed,
      seconds: Number((steps * 3e-8).toPrecision(2)),
    }),
    groups: null,
    event: null,
    reference: null,
    fixed: 'both',
    draws: sampled
      ? wholeNumber((options.draws as number | undefined) ?? standardChainTables, 1, 1e9, '--draws')
      : null,
    ...chanceOf(options, sampled, false),
    ...levelsOf(options, effort),
  });
}
