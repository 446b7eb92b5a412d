// Which rows (or columns) differ: every two of them, or each against a named one, tested by the same statistic on the table of
// those two lines alone, and adjusted for being many. Like the spine, this joins stages.
import { findingsOf, type Answer } from './analyse.js';
import { adjusted } from './family/adjust.js';
import type { ReadTable } from './input/read-table.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import { oneOf, unused } from './plan/settings.js';
import { usageProblem } from './problem/problem.js';
import { nameHint } from './problem/suggest.js';
import { statisticFound } from './result/build-result.js';
import type { Result } from './result/result.js';
import { makeTable, type Table } from './table/table.js';

type Comparisons = NonNullable<Result['comparisons']>;
type Side = 'rows' | 'columns';

/** More pairs than this are a screen that nobody reads, and minutes of work. */
const mostPairs = 1000;

/** Draws of a comparison that must be sampled, where no number was given; and their seed where there is none. */
const standardDraws = 100_000;
const standInSeed = 'compare';

/**
 * @param ask answers the table of two lines.
 * @returns undefined where no comparisons were asked for. Adjusted step-down (Holm 1979), which holds the family-wise error whatever
 * lines differ, since each p is valid for its own two lines.
 */
export async function lineComparisons(
  { read, prepared: { plan } }: Answer,
  options: PlanOptions,
  ask: (read: ReadTable, options: PlanOptions) => Promise<Answer>,
): Promise<Comparisons | undefined> {
  if (options.compare === undefined) {
    if (options.control === undefined) return undefined;
    throw unused('--control', 'without --compare', 'add --compare rows, or leave it out');
  }
  const side = oneOf(options.compare, 'rows', ['rows', 'columns'] as const, '--compare');
  const pairs = pairsOf(read.table, side, options.control);
  const found: Omit<Comparisons['pairs'][number], 'adjustedP'>[] = [];
  for (const [first, second] of pairs) found.push(await compared(first, second));
  const values = adjusted(
    found.map(({ p: { p } }) => ({ p: p ?? 0, leastAttainable: 0 })),
    'holm',
    plan.alpha,
  );
  return {
    side,
    ...(options.control === undefined ? {} : { control: options.control }),
    adjustment: 'holm',
    pairs: found.map((pair, k) => ({ ...pair, adjustedP: values[k]! })),
  };

  async function compared(first: number, second: number): Promise<Omit<Comparisons['pairs'][number], 'adjustedP'>> {
    const labels = side === 'rows' ? read.table.rowLabels : read.table.columnLabels;
    const [one, other] = [labels[first]!, labels[second]!];
    const table = linesOf(read.table, side, first, second);
    const key = JSON.stringify([plan.tableKey, one, other]);
    const answer = await ask({ ...read, table, notes: [] }, wishesFor(plan, options, side, first, second, key));
    const { seed } = answer.prepared.plan;
    return {
      first: one,
      second: other,
      statistic: statisticFound(findingsOf(answer)),
      ...(seed === null ? {} : { seed }),
      p: answer.pValues[0]!,
    };
  }
}

/** Lines that hold counts. @throws Problem (usage) `unknown-label`, `too-many-comparisons`. */
function pairsOf(table: Table, side: Side, control: string | undefined): (readonly [number, number])[] {
  const [labels, totals] =
    side === 'rows' ? [table.rowLabels, table.rowTotals] : [table.columnLabels, table.columnTotals];
  const live = labels.flatMap((_, k) => (totals[k]! > 0 ? [k] : []));
  const held = control === undefined ? undefined : labels.indexOf(control);
  if (held !== undefined && !live.includes(held)) {
    throw usageProblem({
      code: held < 0 ? 'unknown-label' : 'empty-line-named',
      message:
        held < 0 ? `none of the ${side} is labelled "${control!}"` : `the line labelled "${control!}" holds no counts`,
      place: '--control',
      hint: nameHint(
        control!,
        live.map((k) => labels[k]!),
      ),
    });
  }
  const pairs =
    held === undefined
      ? live.flatMap((a, at) => live.slice(at + 1).map((b) => [a, b] as const))
      : live.filter((k) => k !== held).map((k) => [k, held] as const);
  if (pairs.length <= mostPairs) return pairs;
  throw usageProblem({
    code: 'too-many-comparisons',
    message: `${pairs.length} comparisons of ${live.length} ${side} are more than ${mostPairs}`,
    place: '--compare',
    hint: 'compare each with one by --control LABEL, or merge levels first',
  });
}

function linesOf({ counts, rowLabels, columnLabels }: Table, side: Side, first: number, second: number): Table {
  const two = <T>(list: readonly T[]): T[] => [list[first]!, list[second]!];
  return side === 'rows'
    ? makeTable({ counts: two(counts), rowLabels: two(rowLabels), columnLabels })
    : makeTable({ counts: counts.map(two), rowLabels, columnLabels: two(columnLabels) });
}

/** The same statistic and method; scores of the two lines only; draws of its own. */
function wishesFor(
  plan: Plan,
  options: PlanOptions,
  side: Side,
  first: number,
  second: number,
  key: string,
): PlanOptions {
  const { statistic, tail, twoSidedRule, groups, lambda, effort, alpha, samplingConfidence } = options;
  const scores = (own: Side): number[] | undefined => {
    const all = own === 'rows' ? plan.rowScores : plan.columnScores;
    return all === undefined ? undefined : own === side ? [all[first]!, all[second]!] : [...all];
  };
  const reads =
    statistic === 'trend' || plan.groups !== null || plan.rowScores !== undefined || plan.columnScores !== undefined;
  const [rowScores, columnScores] = reads ? [scores('rows'), scores('columns')] : [undefined, undefined];
  const given = {
    statistic,
    tail,
    twoSidedRule,
    groups,
    lambda,
    effort,
    alpha,
    samplingConfidence,
    rowScores,
    columnScores,
  };
  return {
    ...(Object.fromEntries(Object.entries(given).filter(([, value]) => value !== undefined)) as PlanOptions),
    // A comparison that exact work cannot reach is sampled, and says so.
    method: plan.methodAsked === 'exact' ? 'auto' : plan.methodAsked,
    tableKey: key,
    ...(plan.methodAsked === 'asymptotic'
      ? {}
      : {
          seed: plan.seed ?? options.seed ?? standInSeed,
          draws: typeof options.draws === 'number' ? options.draws : standardDraws,
        }),
  };
}
