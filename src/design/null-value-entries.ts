// p-values against a stated value: the odds ratio given both margins (noncentral hypergeometric tails), the difference or ratio
// of two proportions without (Chan 1998), one of them or two for equivalence (Schuirmann 1987).
import { noncentralTails, type Share } from '../null/stated-odds/noncentral-tails.js';
import { constrainedScore } from '../null/unconditional/constrained-score.js';
import { nullValueP } from '../null/unconditional/null-value-p.js';
import { groupsSeen, type TwoGroupsSeen } from '../null/unconditional/outcomes.js';
import type { StatedValue } from '../plan/null-value.js';
import type { Plan } from '../plan/plan.js';
import { smallestDouble, type PValueEntry, type Question } from '../pvalue/contract.js';
import type { Table } from '../table/table.js';
import { wholeTable } from './roles.js';
import { unconditionalEntry } from './unconditional-entries.js';

/** For one value, an entry for each question; for two, that of equivalence and then the two one-tailed ones behind it. */
export function nullValueEntries(questions: readonly Question[], table: Table, plan: Plan): PValueEntry[] {
  const stated = plan.nullValue!;
  const side = plan.fixed === 'columns' || plan.fixed === 'rows' ? plan.fixed : (plan.groups ?? 'rows');
  const seen = groupsSeen(wholeTable(table, plan, side));
  const { statistic } = plan;
  if (!('between' in stated)) return questions.map((question) => entryFor(question, seen, stated.of, stated.value));
  const [low, high] = stated.between;
  const above = entryFor({ tail: 'upper', rule: null, statistic }, seen, stated.of, low);
  const below = entryFor({ tail: 'lower', rule: null, statistic }, seen, stated.of, high);
  const larger = above.log10P! >= below.log10P! ? above : below;
  const { of, between } = stated;
  return [{ ...larger, tail: 'both', nullValue: { of, between: [...between] } }, above, below];
}

/** The score at the stated difference or ratio; of two values, at the one that decides. */
export function statedScore(table: Table, plan: Plan, [, above, below]: readonly PValueEntry[]): number {
  const stated = plan.nullValue!;
  const seen = groupsSeen(wholeTable(table, plan, plan.fixed === 'columns' ? 'columns' : 'rows'));
  const of = stated.of === 'ratio' ? 'ratio' : 'difference';
  const value = 'value' in stated ? stated.value : stated.between[above!.log10P! >= below!.log10P! ? 0 : 1];
  return constrainedScore(seen, { of, value })(seen.firstEvents, seen.secondEvents);
}

function entryFor(question: Question, seen: TwoGroupsSeen, of: StatedValue['of'], value: number): PValueEntry {
  const entry = of === 'odds-ratio' ? oddsRatioEntry(question, seen, value) : scoreEntry(question, seen, { of, value });
  return { ...entry, nullValue: { of, value } };
}

function scoreEntry(
  question: Question,
  seen: TwoGroupsSeen,
  nullValue: { readonly of: 'difference' | 'ratio'; readonly value: number },
): PValueEntry {
  const { tail, rule } = question;
  const ordered = `${tail === 'both' && rule === 'distance' ? 'distance from 0 of the score' : 'score'} at the stated ${nullValue.of}`;
  if (tail !== 'both') return unconditionalEntry(question, nullValueP(seen, nullValue, tail), ordered);
  if (rule !== 'doubled') return unconditionalEntry(question, nullValueP(seen, nullValue, 'distance'), ordered);
  const [upper, lower] = [nullValueP(seen, nullValue, 'upper'), nullValueP(seen, nullValue, 'lower')];
  const smaller = upper.log10 <= lower.log10 ? upper : lower;
  const twice = { p: Math.min(1, 2 * smaller.p), log10: Math.min(0, smaller.log10 + Math.log10(2)) };
  return unconditionalEntry(question, { ...smaller, ...twice }, ordered);
}

function oddsRatioEntry({ tail, rule, statistic }: Question, seen: TwoGroupsSeen, value: number): PValueEntry {
  const { upper, lower, probability, point, tied, relativeError } = noncentralTails(seen, value);
  const smaller = upper.log10 <= lower.log10 ? upper : lower;
  const doubles = rule === 'doubled';
  const one = tail === 'upper' ? upper : tail === 'lower' ? lower : doubles ? smaller : probability;
  const times = doubles ? 2 : 1;
  const ties: Share = tail === 'both' && !doubles ? tied : point;
  const p = Math.min(1, times * one.value);
  const underflow = p < smallestDouble;
  // Both parts are right to relativeError of p, never below 0.
  const strict = Math.max(0, one.value - ties.value);
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: tail === 'both' && !doubles ? 'probability of the count' : 'count of the first group with the event',
    method: 'exact',
    statistic,
    p: underflow ? null : p,
    log10P: Math.min(0, one.log10 + Math.log10(times)),
    ...(underflow ? { reason: 'underflow' as const } : {}),
    strict: Math.min(1, times * strict),
    mid: Math.min(1, times * (strict + ties.value / 2)),
    tied: Math.min(1, times * ties.value),
    point: point.value,
    guaranteed: true,
    errors: [{ kind: 'rounding', relative: relativeError }],
  };
}
