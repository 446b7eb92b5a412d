// The unconditional p-values of a run: one for each question, in the shape of all p-values.
import type { UnconditionalOrder, UnconditionalP } from '../null/unconditional/unconditional-p.js';
import { unconditionalP } from '../null/unconditional/unconditional-p.js';
import { multinomialP, type MultinomialP } from '../null/unconditional/multinomial-p.js';
import { groupsSeen } from '../null/unconditional/outcomes.js';
import type { Plan } from '../plan/plan.js';
import { orderedBy, smallestDouble, type PValueEntry, type Question } from '../pvalue/contract.js';
import type { Table } from '../table/table.js';
import { wholeTable } from './roles.js';

/** Two groups of fixed size; the statistic is pearson, score, wald or probability. */
export function twoGroupsEntries(questions: readonly Question[], table: Table, plan: Plan): PValueEntry[] {
  const seen = groupsSeen(wholeTable(table, plan, plan.fixed === 'columns' ? 'columns' : 'rows'));
  const byConditionalP = plan.outcomeOrder === 'conditional-p';
  return questions.map((question) => {
    const order = orderOf(question, byConditionalP);
    const name = byConditionalP ? conditionalOrderName(question) : orderedBy(question);
    return unconditionalEntry(question, unconditionalP(seen, order, plan.nuisanceRisk ?? 0), name);
  });
}

/** The total alone fixed; the statistic is pearson or score. */
export function multinomialEntries(questions: readonly Question[], table: Table, plan: Plan): PValueEntry[] {
  const { cells, groups, event, first } = wholeTable(table, plan, plan.groups ?? 'rows');
  const at = (group: number, level: number): number =>
    groups === 'rows' ? cells[group]![level]! : cells[level]![group]!;
  const four = [at(first, event), at(first, 1 - event), at(1 - first, event), at(1 - first, 1 - event)] as const;
  const answer = (question: Question): MultinomialP => {
    if (question.tail !== 'both' && question.statistic === 'score') return multinomialP(four, question.tail);
    if (question.rule !== 'doubled') return multinomialP(four, 'distance');
    const [upper, lower] = [multinomialP(four, 'upper'), multinomialP(four, 'lower')];
    const smaller = upper.log10 <= lower.log10 ? upper : lower;
    return { ...smaller, p: Math.min(1, 2 * smaller.p), log10: Math.min(0, smaller.log10 + Math.log10(2)) };
  };
  return questions.map((question) => {
    const found = answer(question);
    const [value, second] = turned(found.nuisance.value, groups, event, first);
    return unconditionalEntry(
      question,
      { ...found, nuisance: { ...found.nuisance, value, second } },
      orderedBy(question),
    );
  });
}

/** From the proportions of the first group and the event to those of the first row and the first column. */
function turned(
  [group, level]: readonly [number, number],
  groups: 'rows' | 'columns',
  event: number,
  first: number,
): [number, number] {
  const firstGroupLine = first === 0 ? group : 1 - group;
  const firstLevelLine = event === 0 ? level : 1 - level;
  return groups === 'rows' ? [firstGroupLine, firstLevelLine] : [firstLevelLine, firstGroupLine];
}

/** How the outcomes of two groups are ordered for a question. */
export function orderOf({ tail, rule, statistic }: Question, byConditionalP: boolean): UnconditionalOrder {
  const isSigned = statistic === 'score' || statistic === 'wald';
  const by = byConditionalP ? 'conditional-p' : statistic === 'wald' ? 'wald' : 'score';
  if (rule === 'doubled') return { by, tail: 'doubled' };
  if (isSigned && tail !== 'both') return { by, tail };
  return { by, tail: byConditionalP ? 'probability' : 'distance' };
}

export const conditionalOrderName = ({ tail, rule, statistic }: Question): string =>
  (statistic === 'score' || statistic === 'wald') && (tail !== 'both' || rule === 'doubled')
    ? 'one-tailed conditional p'
    : 'two-tailed conditional p by probability';

type Found = Pick<UnconditionalP, 'p' | 'log10' | 'relativeError'> & {
  readonly nuisance: { readonly value: number; readonly second?: number; readonly certifiedUpper: number };
};

export function unconditionalEntry(question: Question, found: Found, ordered: string): PValueEntry {
  const { tail, rule, statistic } = question;
  const underflow = found.p < smallestDouble;
  return {
    tail,
    ...(rule === null ? {} : { rule }),
    orderedBy: ordered,
    method: 'unconditional',
    statistic,
    p: underflow ? null : found.p,
    log10P: found.log10,
    ...(underflow ? { reason: 'underflow' as const } : {}),
    strict: null,
    mid: null,
    tied: null,
    nuisance: { ...found.nuisance },
    guaranteed: true,
    errors: [{ kind: 'nuisance-maximum', relative: found.relativeError }],
  };
}
