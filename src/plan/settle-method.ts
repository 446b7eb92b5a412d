// Exact, sampled or asymptotic: what was asked for where it can be had, else - for `auto` alone - what the forecast allows.
import { groupedDigits } from '../numeric/digit-groups.js';
import type { ExactEngine, Forecast } from '../null/forecast.js';
import { effortProblem, usageProblem, type Problem } from '../problem/problem.js';
import type { BoundStatistic, Statistic } from '../statistic/contract.js';
import type { ChosenMethod, Method, TwoSidedRule } from './plan.js';

export interface MethodQuestion {
  readonly asked: Method;
  readonly statistic: Statistic;
  readonly bound: BoundStatistic | null;
  readonly rule: TwoSidedRule | null;
  readonly forecast: Forecast;
  /** Bound on exact work, in counted units. */
  readonly effort: number;
  /** Whether a bracket within that bound is likely to tell more than draws; left out where none can be had. */
  readonly bracketPays?: () => boolean;
}

export interface SettledMethod {
  readonly method: ChosenMethod;
  readonly reason: string;
  /** The exact engine, where it is not the one of the forecast. */
  readonly engine?: ExactEngine;
}

/** @throws Problem: usage where a method has no answer to the question, effort for exact work over the bound. */
export function settleMethod(question: MethodQuestion): SettledMethod {
  const { asked, statistic, forecast, effort } = question;
  const { tables, work } = sizeWords(forecast, effort);
  const fits = forecast.workUnits <= effort;
  const more = raisedBound(forecast.workUnits);
  if (asked === 'asymptotic' && statistic.limit === 'none') throw noAsymptoticForm(statistic);
  if (asked === 'asymptotic' && question.rule === 'blaker') throw ruleNeedsLaw(statistic);
  if (needsWholeLaw(question)) {
    const rule = question.rule!;
    const { bound } = question;
    if (bound?.linear === undefined && bound?.corner === undefined) throw noLaw(statistic, rule);
    if (asked === 'sample') throw ruleNeedsExact(statistic, rule);
    if (asked === 'auto' && !fits) {
      throw effortProblem({
        code: 'exact-over-bound',
        message: `the rule ${rule} needs exact work, and that is over the bound: ${tables}; ${work}`,
        place: `--two-sided-rule ${rule}`,
        hint: `use --two-sided-rule distance or doubled${more}`,
      });
    }
  }
  if ((asked === 'exact' || asked === 'auto') && !fits && question.bracketPays?.()) {
    return {
      method: 'exact',
      reason: `${asked === 'exact' ? 'asked for; ' : ''}${tables}; ${work}; partial sums were merged within it, for a bracket that holds p`,
      engine: 'bracket',
    };
  }
  if (asked === 'exact' && !fits) {
    throw effortProblem({
      code: 'exact-over-bound',
      message: `exact work is over the bound: ${tables}; ${work}`,
      place: '--method exact',
      hint: `use --method sample${more}`,
    });
  }
  if (asked === 'asymptotic' || asked === 'sample') return { method: asked, reason: `asked for; ${tables}` };
  if (asked === 'exact') return { method: 'exact', reason: `asked for; ${tables}; ${work}` };
  return fits
    ? { method: 'exact', reason: `${tables}; ${work}` }
    : { method: 'sample', reason: `exact is out of reach: ${tables}; ${work}` };
}

/** How many tables there are, and what exact work would take. */
export function sizeWords(forecast: Forecast<string>, effort: number): { tables: string; work: string } {
  const { tables, tablesAreCounted, workUnits, seconds } = forecast;
  return {
    tables: `${tablesAreCounted ? '' : 'about '}${inWords(tables)} ${tables === 1 ? 'table has' : 'tables have'} these margins`,
    work: `exact work is forecast at ${inWords(workUnits)} units (${timeInWords(seconds)}), the bound is ${inWords(effort)}`,
  };
}

/** More units than this, about a day's work, are no advice to anybody. */
const mostAdvised = 3e12;

export const raisedBound = (workUnits: number): string =>
  workUnits > mostAdvised
    ? ''
    : `, or raise the bound with --effort ${(workUnits * 1.1).toPrecision(2).replace('e+', 'e')}`;

/** Values compared by how probable they are, or by their tails: random tables do not tell, unless a value is one table (2x2)
 *  and its probability is asked for. */
const needsWholeLaw = ({ asked, bound, rule }: MethodQuestion): boolean =>
  ((rule === 'probability' && bound?.corner === undefined) || rule === 'blaker') &&
  bound !== null &&
  asked !== 'asymptotic';

function noAsymptoticForm({ name }: Statistic): Problem {
  return usageProblem({
    code: 'no-asymptotic-form',
    message: `${name} has no asymptotic p of its own`,
    place: '--method asymptotic',
    hint: 'use --statistic pearson or likelihood-ratio with --method asymptotic, or --method auto',
  });
}

function ruleNeedsExact({ name }: Statistic, rule: TwoSidedRule): Problem {
  return usageProblem({
    code: 'rule-needs-exact',
    message: `the rule ${rule} needs the probability of every value of ${name}, which random tables do not give`,
    place: `--two-sided-rule ${rule}`,
    hint: 'use --two-sided-rule distance or doubled, or --method exact',
  });
}

function ruleNeedsLaw({ name }: Statistic): Problem {
  return usageProblem({
    code: 'rule-needs-exact',
    message: `the rule blaker needs the exact law of ${name}: its limiting law has two tails alike, where it is twice the smaller one`,
    place: '--two-sided-rule blaker',
    hint: 'use --two-sided-rule doubled, or --method exact',
  });
}

function noLaw({ name, own }: Statistic, rule: TwoSidedRule): Problem {
  return usageProblem({
    code: 'rule-without-law',
    message: `the rule ${rule} needs the law of ${name}, which is ${own ? 'not known for a statistic of your own' : 'not worked out for scores of so many digits'}`,
    place: `--two-sided-rule ${rule}`,
    hint: `use --two-sided-rule distance or doubled${own ? '' : ', or scores of fewer digits'}`,
  });
}

/** 1,234 in full, larger numbers to two digits. */
export const inWords = (value: number): string =>
  value < 1e7 ? groupedDigits(Math.round(value)) : value.toExponential(1).replace('e+', 'e');

const timeInWords = (seconds: number): string => {
  if (seconds < 1) return 'under a second';
  const [size, unit] =
    seconds < 120 ? [1, 's'] : seconds < 7200 ? [60, 'min'] : seconds < 2e5 ? [3600, 'h'] : [86_400, 'days'];
  const amount = seconds / Number(size);
  return `about ${amount < 1e4 ? Number(amount.toPrecision(2)) : amount.toExponential(0).replace('e+', 'e')} ${unit}`;
};
