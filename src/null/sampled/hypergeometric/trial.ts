// An inner cell from two look-ups: a binomial count is proposed and then kept or thrown away so that the hypergeometric law is left.
// With any share s, P(x) is proportional to b(x; marked, s) b(drawn - x; total - marked, s), b the binomial probability.
// So x is proposed from the first factor, which depends on `marked` alone (a guide), and kept with the second
// one over its largest value. The roles of marked and drawn can be exchanged. Proposals needed, when s is what the margins
// lead to expect: about the root of the table's total over the units in the columns (or rows) still to come.
import type { UniformSource } from '../../../random/stream.js';
import { logFactorialsUpTo } from './mass.js';
import type { Range } from './spread.js';

const resolution = 2 ** -32;

/** Chances of keeping a proposal: of `units` still to come, `taken` would have to be taken, at an expected `share` of them. */
export interface TrialGrid {
  readonly share: number;
  readonly units: Range;
  readonly taken: Range;
}

const stride = 5;

export class Trials {
  private readonly numbers: Int32Array;
  private readonly chances: Float64Array;
  private readonly logs: Float64Array;

  /** @param total of the table; below 2^16. */
  constructor(
    total: number,
    private readonly grids: readonly TrialGrid[],
  ) {
    this.logs = logFactorialsUpTo(total);
    let size = 0;
    this.numbers = Int32Array.from(
      grids.flatMap(({ units, taken }) => {
        const start = size;
        size += units.length * taken.length;
        return [units.from, units.length, taken.from, taken.length, start];
      }),
    );
    // NaN: not worked out yet.
    this.chances = new Float64Array(size).fill(NaN);
  }

  /** True with probability b(taken; units, share) / max b(.; units, share). */
  keeps(source: UniformSource, cell: number, units: number, taken: number): boolean {
    const { numbers } = this;
    const n = cell * stride;
    const row = units - numbers[n]!;
    const column = taken - numbers[n + 2]!;
    const within = row >>> 0 < numbers[n + 1]! && column >>> 0 < numbers[n + 3]!;
    const at = within ? numbers[n + 4]! + Math.imul(row, numbers[n + 3]!) + column : -1;
    const u = source.uniform();
    let chance = within ? this.chances[at]! : NaN;
    if (u + resolution <= chance) return true;
    if (chance !== chance) {
      chance = this.chance(cell, units, taken);
      if (within) this.chances[at] = chance;
      if (u + resolution <= chance) return true;
    }
    return u < chance && u + resolution * source.uniform() < chance;
  }

  private chance(cell: number, units: number, taken: number): number {
    if (taken < 0 || taken > units) return 0;
    const { share } = this.grids[cell]!;
    const { logs } = this;
    const mode = Math.min(units, Math.floor((units + 1) * share));
    return Math.min(
      1,
      Math.exp(
        logs[mode]! +
          logs[units - mode]! -
          logs[taken]! -
          logs[units - taken]! +
          (taken - mode) * Math.log(share / (1 - share)),
      ),
    );
  }
}
