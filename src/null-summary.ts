// What chance alone does with the statistic of an answer, for a picture of it: every table where they are few, else so many
// random ones. Like the spine, this joins stages; no p-value comes from here.
import type { Answer } from './analyse.js';
import type { OrderingName } from './null/contract.js';
import { orderingFor } from './null/ordering.js';
import { blockSize } from './null/sampled/limits.js';
import { prepareSampler } from './null/sampled/sample-cuts.js';
import { binsFor } from './null/summary/bins.js';
import { atomsOf, type Atom } from './null/summary/edges.js';
import { visitTables } from './null/summary/visit-tables.js';
import { chiSquareLowerTail, normalUpperTail } from './numeric/chi-square-tail.js';
import type { Prepared } from './plan/make-plan.js';
import type { PlanOptions } from './plan/plan.js';
import { blockStream } from './random/stream.js';
import type { NullSummary } from './result/result.js';
import type { LiveTable } from './table/live-table.js';

/** Cells set in all before tables are drawn instead of visited. */
const mostCellsVisited = 400_000;
/** Cells filled in all by draws; a picture needs no more. */
const mostCellsDrawn = 1_000_000;
const mostDraws = 20_000;
/** Makes the draws of a run that has no seed of its own. */
const standInSeed = 'null-summary';

/** @returns undefined where the margins leave one table only, or where the statistic has no value. */
export function summariseNull(found: Answer, prepared: Prepared, options: PlanOptions): NullSummary | undefined {
  const { live, value } = found;
  const { plan, bound, statistic } = prepared;
  if (bound === null || value === null) return undefined;
  const ordering = headlineOrdering(found, prepared);
  const { place } = orderingFor(live, bound, ordering);
  const atoms = new Map<number, { mass: number; inTail: number }>();
  const add = (counts: ArrayLike<number>, mass: number): void => {
    const at = bound.value(counts);
    const atom = atoms.get(at) ?? { mass: 0, inTail: 0 };
    atom.mass += mass;
    if (place(counts) >= 0) atom.inTail += mass;
    atoms.set(at, atom);
  };
  const { forecast } = plan;
  const few = forecast.tablesAreCounted && forecast.tables * live.rows * live.columns <= mostCellsVisited;
  const seed = plan.seed ?? options.seed ?? standInSeed;
  let tables = 0;
  if (few) {
    visitTables(live, (counts, probability) => {
      tables++;
      add(counts, probability);
    });
  } else tables = drawTables(live, seed, plan.tableKey, add);
  const list = atomsOf(atoms);
  const { mean, deviation } = momentsOf(list);
  const outward = ordering === 'lower' || (ordering !== 'upper' && value < mean) ? -1 : 1;
  const limit = ((): NullSummary['limit'] => {
    if (statistic.limit === 'chi-square') {
      return { law: 'chi-square', degreesOfFreedom: Math.max(1, found.degreesOfFreedom!) };
    }
    if (statistic.limit === 'none') return undefined;
    if (bound.standardised === undefined) return { law: 'normal', mean: 0, standardDeviation: 1 };
    return deviation > 0 ? { law: 'normal', mean, standardDeviation: deviation } : undefined;
  })();
  return {
    statistic: statistic.name,
    observed: value === Infinity ? 'infinity' : value === -Infinity ? '-infinity' : value,
    tail: plan.tail,
    orderedBy: ordering,
    method: few ? 'exact' : 'sample',
    tables,
    ...(few ? {} : { seed }),
    ...(limit === undefined ? {} : { limit }),
    bins: binsFor(list, {
      observed: value,
      outward,
      approximate: limit === undefined ? undefined : lowerTailOf(limit),
      least: statistic.limit === 'chi-square' ? 0 : undefined,
    }).map((bin) => ({ ...bin, mass: Math.min(1, bin.mass), inTail: Math.min(1, bin.inTail) })),
  };
}

/** The ordering of the p asked for; where that doubles the smaller tail, this tail. */
function headlineOrdering({ pValues: [headline], value, live }: Answer, { plan, bound }: Prepared): OrderingName {
  if (plan.tail !== 'both') return plan.tail;
  if (plan.twoSidedRule !== 'doubled' && plan.twoSidedRule !== null) return plan.twoSidedRule;
  const doubled = headline?.errors.find((error) => error.kind === 'sampling' || error.kind === 'sequential');
  if (doubled !== undefined && 'tails' in doubled && doubled.tails !== undefined) {
    return doubled.tails.upper <= doubled.tails.lower ? 'upper' : 'lower';
  }
  return smallerTail(live, bound!, value!);
}

/** By the side of the mean on which the value lies, from a few hundred draws where tables are many. */
function smallerTail(live: LiveTable, bound: NonNullable<Prepared['bound']>, value: number): OrderingName {
  let sum = 0;
  let drawn = 0;
  drawTables(
    live,
    standInSeed,
    '',
    (counts) => {
      const at = bound.value(counts);
      if (!Number.isFinite(at)) return;
      sum += at;
      drawn++;
    },
    blockSize,
  );
  return value * drawn < sum ? 'lower' : 'upper';
}

/** @returns how many were drawn, each with the mass of its share. */
function drawTables(
  live: LiveTable,
  seed: string,
  tableKey: string,
  add: (counts: ArrayLike<number>, mass: number) => void,
  atMost = mostDraws,
): number {
  const sampler = prepareSampler(live, []);
  const counts = new Float64Array(live.rows * live.columns);
  const blocks = Math.max(1, Math.floor(Math.min(atMost, mostCellsDrawn / counts.length) / blockSize));
  for (let block = 0; block < blocks; block++) {
    const stream = blockStream(seed, tableKey, block);
    for (let draw = 0; draw < blockSize; draw++) {
      sampler.drawTable(stream, counts);
      add(counts, 1 / (blocks * blockSize));
    }
  }
  return blocks * blockSize;
}

/** Of the finite values; the law of a linear statistic is whole and finite. */
function momentsOf(atoms: readonly Atom[]): { mean: number; deviation: number } {
  const finite = atoms.filter(({ value }) => Number.isFinite(value));
  const mass = finite.reduce((sum, atom) => sum + atom.mass, 0);
  const mean = finite.reduce((sum, atom) => sum + atom.value * atom.mass, 0) / mass;
  const variance = finite.reduce((sum, atom) => sum + (atom.value - mean) ** 2 * atom.mass, 0) / mass;
  return { mean, deviation: Math.sqrt(variance) };
}

const lowerTailOf =
  (limit: NonNullable<NullSummary['limit']>) =>
  (x: number): number =>
    limit.law === 'chi-square'
      ? chiSquareLowerTail(x, limit.degreesOfFreedom).p
      : normalUpperTail(-(x - limit.mean) / limit.standardDeviation).p;
