// Which approximations stand beside an answer: the limiting law of the statistic, by name, with the value on its scale.
import { usageProblem } from '../problem/problem.js';
import type { BoundStatistic, Statistic } from '../statistic/contract.js';
import { pearson } from '../statistic/pearson.js';
import type { LiveTable } from '../table/live-table.js';
import type { PValueEntry, Question } from './contract.js';
import { chiSquarePValue, normalPValue } from './from-asymptotic.js';

export interface Approximation {
  /** Of the statistic, or of one of its forms. */
  readonly name: string;
  readonly value: number;
  /** Left out for a normal limit. */
  readonly degreesOfFreedom?: number;
  /** The value is on another scale than that of the statistic reported. */
  readonly rescaled?: true;
}

/** (rows - 1)(columns - 1) unless the statistic has its own, for statistics with a chi-square limit. */
export const degreesOfFreedomOf = (
  statistic: Statistic,
  live: LiveTable,
  bound: BoundStatistic | null,
): number | undefined =>
  statistic.limit === 'chi-square' ? (bound?.degreesOfFreedom ?? (live.rows - 1) * (live.columns - 1)) : undefined;

/** `probability` has no limiting law of its own; Pearson's statistic stands in, and the entry says so. */
export function approximationsOf(
  statistic: Statistic,
  live: LiveTable,
  bound: BoundStatistic | null,
  value: number | null,
): Approximation[] {
  if (value === null) return [];
  const degreesOfFreedom = (live.rows - 1) * (live.columns - 1);
  switch (statistic.limit) {
    case 'chi-square':
      return [{ name: statistic.name, value, degreesOfFreedom: bound?.degreesOfFreedom ?? degreesOfFreedom }];
    case 'normal':
      return bound?.standardised?.map((form) => ({ ...form, rescaled: true })) ?? [{ name: statistic.name, value }];
    case 'none': {
      if (statistic.name !== 'probability' || bound === null) return [];
      const standIn = pearson.bind(live, { groups: 'rows', event: 0, first: 0 });
      return [{ name: pearson.name, value: standIn.value(live.counts), degreesOfFreedom }];
    }
  }
}

/** The questions answered by approximation alone; further forms answer the first question only. */
export function asymptoticAlone(
  questions: readonly Question[],
  [usual, ...others]: readonly Approximation[],
): PValueEntry[] {
  const found = questions.map((question) => {
    const entry = usual === undefined ? undefined : asymptoticPValue(question, usual);
    if (entry !== undefined) return entry;
    throw usageProblem({
      code: 'no-asymptotic-value',
      message: `the ${question.tail === 'both' ? 'two' : question.tail}-tailed p of ${question.statistic} has no approximation ${whyNone(usual)}`,
      place: '--method asymptotic',
      hint: 'use --method exact or --method sample',
    });
  });
  return [...found, ...asymptoticBeside(questions[0]!, others)];
}

function whyNone(usual: Approximation | undefined): string {
  if (usual === undefined) return 'where all scores of a side are equal';
  return Number.isFinite(usual.value) ? `where its value is ${usual.value}` : 'where its value is infinite';
}

/** Those that have something to say about the question. */
export const asymptoticBeside = (question: Question, approximations: readonly Approximation[]): PValueEntry[] =>
  approximations.map((one) => asymptoticPValue(question, one)).filter((entry) => entry !== undefined);

/** Undefined where there is nothing to say (an infinite value; no value below the observed). */
function asymptoticPValue(question: Question, approximation: Approximation): PValueEntry | undefined {
  const { name, value, degreesOfFreedom, rescaled } = approximation;
  if (!Number.isFinite(value)) return undefined;
  const asked = { ...question, statistic: name };
  if (degreesOfFreedom === undefined) return { ...normalPValue(asked, value), ...(rescaled ? { value } : {}) };
  if (question.tail === 'lower' && value <= 0) return undefined;
  return chiSquarePValue(asked, value, Math.max(1, degreesOfFreedom));
}
