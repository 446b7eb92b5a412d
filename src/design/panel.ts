// How much the choice of design matters: for a 2x2 table, what p would be had the study fixed something else. Each line is
// worked out only where its forecast is small; the others say so.
import { multinomialWork } from '../null/unconditional/multinomial-work.js';
import { groupsSeen } from '../null/unconditional/outcomes.js';
import { unconditionalWork } from '../null/unconditional/unconditional-work.js';
import { fixedSides, isTwoByTwo, type FixedSide } from '../plan/design.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import type { Table } from '../table/table.js';
import { wholeTable } from './roles.js';
import { multinomialEntries, twoGroupsEntries } from './unconditional-entries.js';

/** One line: p under a design. */
export interface DesignLine {
  fixed: FixedSide;
  /** What the run itself took to be fixed. */
  assumed: boolean;
  statistic: string;
  orderedBy: string | null;
  method: PValueEntry['method'] | null;
  p: number | null;
  log10P: number | null;
  reason?: 'underflow' | 'over-bound';
  /** Counted work that was forecast, where it was too much. */
  workUnits?: number;
  nuisance?: { value: number; second?: number; certifiedUpper: number };
}

/** About a tenth of a second. */
export const panelBound = 3e6;

/** Statistics that order the outcomes of two groups; score stands for other signed ones, pearson for other upper ones. */
const ordering = ['pearson', 'score', 'wald', 'probability'];

/**
 * Undefined for tables that are not 2x2, for a p by approximation alone, and where no outcomes are ordered that way: the lower
 * tail of an upper statistic, one tail of a signed one with scores.
 * @param found the p-values of the run, conditional ones included.
 */
export function designPanel(
  table: Table,
  plan: Plan,
  question: Question,
  found: readonly PValueEntry[],
): DesignLine[] | undefined {
  if (!isTwoByTwo(table) || plan.method === 'asymptotic') return undefined;
  const comparesGroups = question.statistic === 'score' || question.statistic === 'wald';
  if (!comparesGroups && (question.tail === 'lower' || plan.rowScores !== undefined) && question.tail !== 'both') {
    return undefined;
  }
  const statistic = ordering.includes(question.statistic)
    ? question.statistic
    : question.tail === 'both'
      ? 'score'
      : 'pearson';
  return fixedSides.map((fixed) => {
    if (fixed === plan.fixed) return { assumed: true, ...lineFrom(fixed, found[0]!) };
    if (fixed === 'both') return { assumed: false, ...lineFrom(fixed, found.find(isConditional) ?? found[0]!) };
    return { assumed: false, ...otherDesign(fixed, table, plan, { ...question, statistic }) };
  });
}

const isConditional = ({ method, errors }: PValueEntry): boolean =>
  method === 'exact' || (method === 'sample' && !errors.some(({ kind }) => kind === 'approximation'));

type Line = Omit<DesignLine, 'assumed'>;

const lineFrom = (
  fixed: FixedSide,
  { statistic, orderedBy, method, p, log10P, reason, nuisance }: PValueEntry,
): Line => ({
  fixed,
  statistic,
  orderedBy,
  method,
  p,
  log10P,
  ...(reason === undefined ? {} : { reason }),
  ...(nuisance === undefined ? {} : { nuisance }),
});

function otherDesign(fixed: Exclude<FixedSide, 'both'>, table: Table, plan: Plan, asked: Question): Line {
  const { statistic, rule } = asked;
  const workUnits =
    fixed === 'total' ? multinomialWork(table.total) : unconditionalWork(groupsSeen(wholeTable(table, plan, fixed)));
  if (workUnits > panelBound) {
    const nothing = { fixed, statistic, orderedBy: null, method: null, p: null, log10P: null };
    return { ...nothing, reason: 'over-bound', workUnits };
  }
  const folded = rule === null || rule === 'doubled' ? rule : 'distance';
  if (fixed === 'total') {
    const asScore = statistic === 'score' || statistic === 'wald' ? 'score' : 'pearson';
    return lineFrom(fixed, multinomialEntries([{ ...asked, statistic: asScore, rule: folded }], table, plan)[0]!);
  }
  const byConditionalP = statistic === 'probability' || rule === 'probability';
  const outcomeOrder = byConditionalP ? 'conditional-p' : 'statistic';
  const question = { ...asked, rule: byConditionalP ? rule : folded };
  return lineFrom(fixed, twoGroupsEntries([question], table, { ...plan, fixed, outcomeOrder })[0]!);
}
