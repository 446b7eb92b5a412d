// One outcome of many: its table is what a table of groups by profiles comes down to, its statistic Pearson's, as an exact ratio
// of whole numbers. Each distinct table is valued once.
import { greatestCommonDivisor } from '../numeric/greatest-common-divisor.js';
import type { JointCounts } from '../input/joint-counts.js';

/** sum n^2 / (R C): with the total the same for all outcomes, Pearson's statistic is n (this - 1). */
export class ExactValue {
  private readonly approximately: number;

  constructor(
    private readonly numerator: bigint,
    private readonly denominator: bigint,
  ) {
    const divisor = greatestCommonDivisor(numerator, denominator) || 1n;
    this.numerator = numerator / divisor;
    this.denominator = denominator / divisor;
    // Both may lie beyond the doubles; 64 bits of the quotient tell.
    this.approximately = Number((this.numerator << 64n) / this.denominator) * 2 ** -64;
  }

  compare(other: ExactValue): number {
    const difference = this.approximately - other.approximately;
    if (Math.abs(difference) > 1e-12 * this.approximately) return difference;
    const apart = this.numerator * other.denominator - other.numerator * this.denominator;
    return apart > 0n ? 1 : apart < 0n ? -1 : 0;
  }

  statistic(total: number): number {
    const scaled = ((this.numerator - this.denominator) * BigInt(total)) << 64n;
    return Number(scaled / this.denominator) * 2 ** -64;
  }
}

export class OutcomeValues {
  readonly observedCounts: number[][];
  readonly observedValue: number;
  private readonly levelOf: readonly number[];
  private readonly levels: number;
  private readonly weights: readonly bigint[];
  private readonly scale: bigint;
  private readonly indexes = new Map<string, number>();
  private readonly found: { value: ExactValue; draws: number }[] = [];
  private rank: Int32Array | undefined;
  private atLeast: Float64Array | undefined;
  /** Distinct values, rising. */
  private values: ExactValue[] = [];

  constructor(joint: JointCounts, outcome: number) {
    this.levelOf = joint.profiles.map((profile) => profile[outcome]!);
    this.levels = joint.outcomes[outcome]!.levels.length;
    this.observedCounts = this.collapsed(joint.counts);
    const rows = this.observedCounts.map(addUp);
    const columns = this.observedCounts[0]!.map((_, j) => addUp(this.observedCounts.map((row) => row[j]!)));
    const [rowWeights, columnWeights] = [complements(rows), complements(columns)];
    this.weights = rowWeights.list.flatMap((row) => columnWeights.list.map((column) => row * column));
    this.scale = rowWeights.multiple * columnWeights.multiple;
    this.observedValue = this.valueOf(this.observedCounts).statistic(addUp(rows));
    this.indexOf(this.observedCounts);
  }

  /** First pass: learns the law. */
  see(counts: readonly (readonly number[])[]): void {
    this.found[this.indexOf(this.collapsed(counts))]!.draws++;
  }

  /** Rank of a drawn table's value among the distinct ones. */
  rankOf(counts: readonly (readonly number[])[]): number {
    return this.ranks()[this.indexOf(this.collapsed(counts))]!;
  }

  get observedRank(): number {
    return this.ranks()[0]!;
  }

  get ranked(): readonly ExactValue[] {
    this.ranks();
    return this.values;
  }

  /** Draws whose value has this rank or a higher one. */
  drawsAtLeast(rank: number): number {
    this.ranks();
    return this.atLeast![rank]!;
  }

  private ranks(): Int32Array {
    if (this.rank !== undefined) return this.rank;
    const order = [...this.found.keys()].sort((a, b) => this.found[a]!.value.compare(this.found[b]!.value));
    const rank = new Int32Array(this.found.length);
    const draws: number[] = [];
    order.forEach((index, at) => {
      const { value } = this.found[index]!;
      if (at === 0 || value.compare(this.values.at(-1)!) !== 0) {
        this.values.push(value);
        draws.push(0);
      }
      rank[index] = this.values.length - 1;
      draws[draws.length - 1]! += this.found[index]!.draws;
    });
    this.atLeast = Float64Array.from(draws);
    for (let k = draws.length - 2; k >= 0; k--) this.atLeast[k]! += this.atLeast[k + 1]!;
    return (this.rank = rank);
  }

  private indexOf(counts: number[][]): number {
    const name = counts.join(';');
    let index = this.indexes.get(name);
    if (index === undefined) {
      index = this.found.push({ value: this.valueOf(counts), draws: 0 }) - 1;
      this.indexes.set(name, index);
    }
    return index;
  }

  private valueOf(counts: readonly (readonly number[])[]): ExactValue {
    const sum = counts.flat().reduce((all, count, cell) => all + BigInt(count) ** 2n * this.weights[cell]!, 0n);
    return new ExactValue(sum, this.scale);
  }

  private collapsed(counts: readonly (readonly number[])[]): number[][] {
    return counts.map((row) => {
      const line = new Array<number>(this.levels).fill(0);
      row.forEach((count, profile) => (line[this.levelOf[profile]!]! += count));
      return line;
    });
  }
}

const addUp = (numbers: readonly number[]): number => numbers.reduce((a, b) => a + b, 0);

/** The least common multiple of the totals that are not 0, and it over each; 0 for an empty line. */
function complements(totals: readonly number[]): { list: bigint[]; multiple: bigint } {
  const whole = totals.map(BigInt);
  const multiple = whole.reduce(
    (lcm, total) => (total === 0n ? lcm : (lcm / greatestCommonDivisor(lcm, total)) * total),
    1n,
  );
  return { list: whole.map((total) => (total === 0n ? 0n : multiple / total)), multiple };
}
