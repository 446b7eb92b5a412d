// The plan where exact work, once begun, turned out to be out of reach although its forecast did not say so.
import type { OutOfReach } from '../null/exact/out-of-reach.js';
import { effortProblem } from '../problem/problem.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import { makePlan, type Prepared } from './make-plan.js';
import type { Plan, PlanOptions } from './plan.js';
import { inWords, sizeWords } from './settle-method.js';

/**
 * Sampling instead, for `auto`.
 * @throws Problem (effort) when exact was asked for.
 */
export function planWithoutExact(
  table: Table,
  live: LiveTable,
  options: PlanOptions,
  first: Plan,
  outOfReach: OutOfReach,
): Prepared {
  const { methodAsked } = first;
  const reason = whatHappened(first, outOfReach);
  if (methodAsked === 'exact') {
    const more = (3 * Math.max(first.effort, first.forecast.workUnits)).toPrecision(2);
    throw effortProblem({
      code: outOfReach.bound === 'memory' ? 'exact-over-memory' : 'exact-over-bound',
      message: reason,
      place: '--method exact',
      hint: `use --method sample${outOfReach.bound === 'memory' ? '' : `, or raise the bound with --effort ${more}`}`,
    });
  }
  const prepared = makePlan(table, live, { ...options, method: 'sample' });
  const plan = Object.freeze({ ...prepared.plan, methodAsked, methodReason: reason, forecast: first.forecast });
  return { ...prepared, plan };
}

function whatHappened({ forecast, effort }: Plan, { bound, amount }: OutOfReach): string {
  const { tables, work } = sizeWords(forecast, effort);
  if (forecast.engine === 'bracket') {
    const why = bound === 'width' ? 'would be no narrower than what as many draws tell' : 'cannot be had within it';
    return `exact is out of reach: ${tables}; ${work}; a bracket ${why}`;
  }
  const ended =
    bound === 'memory' ? 'more partial sums than memory is allowed for' : `ended after ${inWords(amount)} units`;
  return `exact work outgrew its forecast: ${tables}; ${work}; ${ended}`;
}
