// An inner cell from two look-ups: a binomial count is proposed and then kept or thrown away so that the hypergeometric law is left.
// With any share s, P(x) is proportional to b(x; marked, s) b(drawn - x; total - marked, s), b the binomial probability.
// So x is proposed from the first factor, which depends on `marked` alone (a guide), and kept with the second
// one over its largest value. The roles of marked and drawn can be exchanged. Proposals needed, when s is what the margins
// lead to expect: about the root of the table's total over the units in the columns (or rows) still to come.
import type { UniformSource } from '../../../random/stream.js';
import { logFactorialsUpTo } from './mass.js';
import type { Range } from './spread.js';

/** Chances of keeping a proposal: of `units` still to come, `taken` would have to be taken, at an expected `share` of them. */
export interface TrialGrid {
  readonly share: number;
  readonly units: Range;
  readonly taken: Range;
  /** Units never exceed this; below 2^16. */
  readonly mostUnits: number;
}

export class Trial {
  private readonly unitsFrom: number;
  private readonly unitsLength: number;
  private readonly takenFrom: number;
  private readonly takenLength: number;
  /** In units of 2^-16, by units, then by taken; NaN: not worked out yet. */
  private readonly chances: Float64Array;
  private readonly logs: Float64Array;
  private readonly logOdds: number;

  constructor(private readonly grid: TrialGrid) {
    const { share, units, taken } = grid;
    this.unitsFrom = units.from;
    this.unitsLength = units.length;
    this.takenFrom = taken.from;
    this.takenLength = taken.length;
    this.chances = new Float64Array(units.length * taken.length).fill(NaN);
    this.logs = logFactorialsUpTo(grid.mostUnits);
    this.logOdds = Math.log(share / (1 - share));
  }

  /**
   * True with probability b(taken; units, share) / max b(.; units, share). Decided by `half`, 16 random bits, and by more
   * from `source` where these do not suffice.
   */
  keeps(source: UniformSource, units: number, taken: number, half: number): boolean {
    const row = units - this.unitsFrom;
    const column = taken - this.takenFrom;
    const within = row >= 0 && row < this.unitsLength && column >= 0 && column < this.takenLength;
    const at = within ? row * this.takenLength + column : -1;
    let chance = within ? this.chances[at]! : NaN;
    if (half + 1 <= chance) return true;
    if (chance !== chance) {
      chance = this.chance(units, taken);
      if (within) this.chances[at] = chance;
    }
    return half + 1 <= chance || (half < chance && half + source.uniform() < chance);
  }

  /** The chance in units of 2^-16. */
  private chance(units: number, taken: number): number {
    if (taken < 0 || taken > units) return 0;
    const { logs } = this;
    const mode = Math.min(units, Math.floor((units + 1) * this.grid.share));
    const atMode = logs[mode]! + logs[units - mode]!;
    const log = atMode - logs[taken]! - logs[units - taken]! + (taken - mode) * this.logOdds;
    return Math.min(1, Math.exp(log)) * 0x10000;
  }
}
