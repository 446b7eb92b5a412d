// The spine for clusters: whole litters, plates or households change groups, not their members.
//   1. Which clusters there are, and which are alike.             clusters -> kinds
//   2. What will be done, settled before it starts.                plan
//   3. How far the units lie from independence.                   statistic of the units
//   4. How much of what dealing clusters to groups does lies as far. null of the kinds -> cut
//   5. What that says, with its error.                            pvalue
import type { ReadTable } from './input/read-table.js';
import { exactCuts, onlyTable } from './null/exact/exact-cuts.js';
import { OutOfReach } from './null/exact/out-of-reach.js';
import type { ExactEngine } from './null/forecast.js';
import { orderingFor } from './null/ordering.js';
import { choicesOf, refuseUnread } from './plan/choices.js';
import { planClusters, statisticForClusters } from './plan/cluster-plan.js';
import type { Plan, PlanOptions } from './plan/plan.js';
import { noRoles, rolesOf } from './plan/roles.js';
import { unused } from './plan/settings.js';
import { approximationsOf, asymptoticAlone, asymptoticBeside } from './pvalue/approximations.js';
import type { PValueEntry } from './pvalue/contract.js';
import { conditionalPValues, orderingsNeeded, questionsOf } from './pvalue/p-values.js';
import { buildResult } from './result/build-result.js';
import { emptyLineNotes, onlyOneTable, unsettledNotes } from './result/notes.js';
import type { Result } from './result/result.js';
import { sampledPValues, type Surroundings } from './sampled-answer.js';
import { bindToClusters, clusterForm, clusterStatistics } from './strata/clusters/cluster-statistic.js';
import { kindsOf } from './strata/clusters/kinds.js';
import { checkExpectations } from './table/expectation-check.js';
import { hasOneTableOnly, liveTable } from './table/live-table.js';

const noApproximation =
  'An approximation for independent units does not hold for clusters, whatever the expected counts.';

/**
 * Decides whether rows and columns are associated where units come in clusters, each in one row.
 * @throws Problem, of kind `usage` or `effort`.
 */
export async function analyseClusters(
  read: ReadTable,
  options: PlanOptions,
  surroundings: Surroundings = {},
): Promise<Result> {
  const { table } = read;
  const clusters = read.clusters!;
  const units = liveTable(table);
  const kinds = kindsOf(clusters, table.rowLabels.length);
  const live = liveTable(kinds.table);
  const name = statisticForClusters(options, clusterStatistics, 'pearson');
  const statistic = clusterForm(name);
  refuseUnread(statistic, options, false);
  if (options.groups === 'columns')
    throw unused('--groups columns', 'with --cluster', 'clusters lie in rows, so the rows are the groups');
  const named = statistic.shape === '2x2' ? rolesOf(table, units, statistic, options) : null;
  const { choices, echo } = choicesOf(table, units, statistic, options);
  const nothingVaries = hasOneTableOnly(live) || hasOneTableOnly(units);
  const bound = nothingVaries ? null : bindToClusters(name, units, live, kinds, named ?? noRoles, choices);
  const planFor = (wishes: PlanOptions): Plan => planClusters(wishes, statistic, bound, live, named, echo);

  const first = planFor(options);
  try {
    return await carryOut(first);
  } catch (thrown) {
    if (!(thrown instanceof OutOfReach) || first.methodAsked === 'exact') throw thrown;
    const methodReason = 'exact work outgrew its forecast: more partial sums than memory is allowed for';
    return carryOut({ ...planFor({ ...options, method: 'sample' }), methodAsked: first.methodAsked, methodReason });
  }

  async function carryOut(plan: Plan): Promise<Result> {
    const questions = questionsOf(plan);
    const value = bound === null ? 0 : bound.value(live.counts);
    const approximations = bound === null ? [] : approximationsOf(statistic, live, bound, value).slice(0, 1);
    const found = await askNull();
    const sizes = clusters.map(({ counts }) => counts.reduce((sum, n) => sum + n, 0));
    return buildResult({
      read,
      plan,
      named,
      value: named !== null && named.referenceLabel === null ? null : value,
      degreesOfFreedom: undefined,
      pValues: [...found, ...(plan.method === 'asymptotic' ? [] : asymptoticBeside(questions[0]!, approximations))],
      expectations: { ...checkExpectations(units), cochranAdvice: 'not-met', cochranSentence: noApproximation },
      tables: undefined,
      clusters: {
        from: read.source.clusterFrom ?? null,
        number: clusters.length,
        byRow: table.rowLabels.map((_, row) => clusters.filter((cluster) => cluster.row === row).length),
        smallest: sizes.reduce((least, n) => Math.min(least, n)),
        largest: sizes.reduce((most, n) => Math.max(most, n)),
        kinds: kinds.counts.length,
        alike: kinds.counts.map((counts, kind) => ({
          counts: [...counts],
          byRow: kinds.table.counts.map((row) => row[kind]!),
        })),
      },
      notes: [
        ...read.notes,
        ...emptyLineNotes(table),
        ...(nothingVaries ? [onlyOneTable] : []),
        ...(await unsettledNotes(found[0]!, plan)),
      ],
    });

    async function askNull(): Promise<PValueEntry[]> {
      const names = orderingsNeeded(questions);
      if (bound === null) {
        const { cuts, point } = onlyTable({ ...live, rows: 1 }, names);
        return conditionalPValues(questions, cuts, point, plan.samplingConfidence);
      }
      if (plan.method === 'asymptotic') return asymptoticAlone(questions, approximations);
      const orderings = names.map((each) => orderingFor(live, bound, each));
      if (plan.method === 'sample') return sampledPValues(questions, live, orderings, plan, null, surroundings);
      const { cuts, point } = await exactCuts(live, orderings, plan.forecast.engine as ExactEngine, plan.statistic);
      return conditionalPValues(questions, cuts, point, plan.samplingConfidence);
    }
  }
}
