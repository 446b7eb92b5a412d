// Random tables within strata: in every stratum one table with its own margins, drawn by the sampler that serves single tables, all from the
// stream of the block. Which layers, in which order and how is settled by the margins alone.
import type { OrderingName } from '../../null/contract.js';
import { prepareSampler, type Tally } from '../../null/sampled/sample-cuts.js';
import type { UniformSource } from '../../random/stream.js';
import type { Judged } from './judge.js';
import type { Problem } from './problem.js';

export interface LayerSampler {
  /** So many sets of tables from a stream; one tally for each ordering. */
  countBlock(stream: UniformSource, draws: number): Tally[];
}

/** @param problem layers of two rows and two columns at least */
export function layerSampler(problem: Problem, judged: Judged, orderings: readonly OrderingName[]): LayerSampler {
  const samplers = problem.layers.map(({ live }) => prepareSampler(live, []));
  const tables = problem.layers.map(({ live }) => new Float64Array(live.rows * live.columns));
  const places = orderings.map((name) => judged.placeBy(name));
  const t = new Float64Array(problem.dimension);
  const exact = (): bigint[] => judged.exactSum(tables);
  return {
    countBlock(stream, draws) {
      const counts = orderings.map((): [number, number, number] => [0, 0, 0]);
      for (let draw = 0; draw < draws; draw++) {
        t.fill(0);
        for (let layer = 0; layer < samplers.length; layer++) {
          const table = tables[layer]!;
          samplers[layer]!.drawTable(stream, table);
          const { index, value } = judged.weights[layer]!;
          for (let cell = 0; cell < table.length; cell++) {
            if (index[cell]! >= 0) t[index[cell]!]! += value[cell]! * table[cell]!;
          }
        }
        for (let o = 0; o < places.length; o++) counts[o]![places[o]!(t, exact) + 1]!++;
      }
      return counts;
    },
  };
}
