// The plan of a test of change in pairs: the same wishes, checked for what such a test can read, and the method settled.
import { standardEffort, type Forecast, type PairsEngine } from '../null/forecast.js';
import { groupedDigits } from '../numeric/digit-groups.js';
import { effortProblem, usageProblem } from '../problem/problem.js';
import { pairedNamed, type PairedStatistic } from '../statistic/paired.js';
import { drawsOf } from './draws.js';
import { chanceOf, levelsOf, refuseEmptySeed } from './footing.js';
import { methods, tails, twoSidedRules, type ChosenMethod, type Plan, type PlanOptions } from './plan.js';
import { raisedBound } from './settle-method.js';
import { oneOf, positive, share, unused } from './settings.js';

/** What exact work would take, as counted by the engine. */
export interface PairsWork {
  readonly engine: PairsEngine;
  /** False where no bound on work would let the engine answer. */
  readonly possible: boolean;
  readonly workUnits: number;
  /** Ways in which the changed pairs could have been split. */
  readonly tables: number;
  /** Changed pairs between two levels, at most so many that they can be drawn. */
  readonly canBeDrawn: boolean;
}

/** McNemar for two levels, Bowker for more, unless told. @throws Problem (usage). */
export function pairedStatisticOf(options: PlanOptions, levels: number): PairedStatistic {
  const { statistic } = options;
  if (statistic === undefined) return pairedNamed(levels === 2 ? 'mcnemar' : 'bowker');
  if (typeof statistic !== 'string') {
    throw unused(
      '--paired',
      'on a statistic of your own',
      'leave --paired out, or name one of the statistics for pairs',
    );
  }
  const found = pairedNamed(statistic);
  if (found.name === 'mcnemar' && levels !== 2) {
    throw usageProblem({
      code: 'not-two-levels',
      message: `mcnemar compares two levels; this table has ${levels}`,
      place: '--statistic',
      hint: 'use --statistic bowker or marginal-homogeneity',
    });
  }
  return found;
}

const unread = [
  'groups',
  'event',
  'reference',
  'rowScores',
  'columnScores',
  'lambda',
  'ordered',
  'compare',
  'control',
  'fixed',
  'outcomeOrder',
  'nuisanceRisk',
  'nullValue',
] as const;

/** Wishes that no analysis of pairs reads. @throws Problem (usage) `option-without-effect`. */
export function refuseUnreadByPairs(options: PlanOptions): void {
  for (const name of unread) {
    if (options[name] === undefined) continue;
    const option = `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
    throw unused(option, 'with --paired', 'leave it out');
  }
}

/** @throws Problem: usage for wishes that make no sense together, effort for exact work over the bound. */
export function planPairs(options: PlanOptions, statistic: PairedStatistic, work: PairsWork): Plan {
  refuseEmptySeed(options);
  const asked = oneOf(options.method, 'auto', methods, '--method');
  const effort = positive(options.effort, standardEffort, '--effort');
  const alpha = share(options.alpha, 0.05, '--alpha');
  const drawing = drawsOf(options, asked, alpha);
  const { method, reason } = settle(asked, work, effort);
  const sampled = method === 'sample';
  return Object.freeze({
    statistic: statistic.name,
    paired: true,
    ...tailOf(options, statistic),
    method,
    methodAsked: asked,
    methodReason: reason,
    forecast: forecastOf(work),
    groups: null,
    event: null,
    reference: null,
    fixed: 'pairs',
    ...(sampled ? drawing : { draws: null }),
    ...chanceOf(options, sampled),
    ...levelsOf(options, effort),
  });
}

function tailOf(options: PlanOptions, { name, words }: PairedStatistic): Pick<Plan, 'tail' | 'twoSidedRule'> {
  const signed = name === 'mcnemar';
  const tail = oneOf(options.tail, signed ? 'both' : 'upper', tails, '--tail');
  if (!signed && tail !== 'upper') {
    throw usageProblem({
      code: 'tail-of-upper-statistic',
      message: `${words} grows with changes in every direction, so it has an upper tail only`,
      place: `--tail ${tail}`,
      hint: 'leave --tail out; for two levels, --statistic mcnemar has two tails',
    });
  }
  if (tail === 'both')
    return { tail, twoSidedRule: oneOf(options.twoSidedRule, 'distance', twoSidedRules, '--two-sided-rule') };
  if (options.twoSidedRule !== undefined) {
    throw unused('--two-sided-rule', `with --tail ${tail}`, 'leave it out');
  }
  return { tail, twoSidedRule: null };
}

const secondsPerUnit = 2e-8;

const forecastOf = ({ engine, workUnits, tables }: PairsWork): Forecast<PairsEngine> =>
  Object.freeze({
    engine,
    workUnits: Math.round(workUnits),
    tables: tables < Number.MAX_SAFE_INTEGER ? tables : Number(Math.min(tables, Number.MAX_VALUE).toPrecision(3)),
    tablesAreCounted: tables < Number.MAX_SAFE_INTEGER,
    seconds: Number((workUnits * secondsPerUnit).toPrecision(2)),
  });

function settle(asked: Plan['methodAsked'], work: PairsWork, effort: number): { method: ChosenMethod; reason: string } {
  const { possible, workUnits, canBeDrawn } = work;
  const cost = `exact work is forecast at ${inWords(workUnits)} units, the bound is ${inWords(effort)}`;
  const beyond = 'exact work would take more memory than is allowed for, or smaller numbers than there are';
  const fits = possible && workUnits <= effort;
  if (asked === 'exact' && !fits) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: possible ? cost : beyond,
      place: '--method exact',
      hint: possible ? `use --method sample${raisedBound(workUnits)}` : 'use --method sample',
    });
  }
  if (asked === 'sample' && !canBeDrawn) {
    throw usageProblem({
      code: 'too-many-changes',
      message: 'more pairs changed between two levels than can be drawn (1e8)',
      place: '--method sample',
      hint: 'use --method asymptotic',
    });
  }
  if (asked !== 'auto')
    return { method: asked, reason: asked === 'asymptotic' ? 'asked for' : `asked for; ${possible ? cost : beyond}` };
  if (fits) return { method: 'exact', reason: cost };
  const why = `exact is out of reach: ${possible ? cost : beyond}`;
  return canBeDrawn
    ? { method: 'sample', reason: why }
    : { method: 'asymptotic', reason: `${why}; and more pairs changed than can be drawn` };
}

const inWords = (value: number): string =>
  value < 1e7 ? groupedDigits(Math.round(value)) : value.toExponential(1).replace('e+', 'e');
