// Power by simulation, for plans that no closed sum reaches: tables drawn from the planned probabilities, each tested, and the
// share of rejections with its Clopper-Pearson limits. Table k has a stream of its own, so the same seed gives the same answer.
import { MultinomialDrawer } from '../null/unconditional/multinomial-draws.js';
import { blockStream } from '../random/stream.js';

export interface SimulationPlan {
  /** rows: one law for each group, of so many units; total: one law for all cells together, row-major. */
  readonly laws: readonly { readonly units: number; readonly probabilities: readonly number[] }[];
  readonly rows: number;
  readonly columns: number;
  readonly tables: number;
  readonly seed: string;
  /** Names the plan's streams apart from others of the same seed. */
  readonly key: string;
}

/** Row-major counts of table k, k from 0. */
export function plannedTable({ laws, rows, columns, seed, key }: SimulationPlan, k: number): number[][] {
  const stream = blockStream(seed, key, k);
  const cells = laws.flatMap(({ units, probabilities }) => {
    const counts = new Float64Array(probabilities.length);
    new MultinomialDrawer(units, probabilities).draw(stream, counts);
    return Array.from(counts);
  });
  return Array.from({ length: rows }, (_, i) => cells.slice(i * columns, (i + 1) * columns));
}

/**
 * Counts the tables that the test rejects; equal tables are tested once.
 * @param rejects tells of one table whether its p is at most alpha.
 */
export async function countRejections(
  plan: SimulationPlan,
  rejects: (counts: number[][]) => Promise<boolean>,
  onProgress?: (done: number, tables: number) => void,
): Promise<number> {
  const known = new Map<string, boolean>();
  let rejected = 0;
  for (let k = 0; k < plan.tables; k++) {
    const counts = plannedTable(plan, k);
    const name = counts.join(';');
    let verdict = known.get(name);
    if (verdict === undefined) {
      verdict = await rejects(counts);
      known.set(name, verdict);
    }
    if (verdict) rejected++;
    onProgress?.(k + 1, plan.tables);
  }
  return rejected;
}
