// One node of the network of a linear statistic: the row totals still to be filled, and the law of the sum so far among
// the partial tables that leave them - dense over a range of whole numbers, or sparse where sums are few and far between.

/** Probabilities are held times 2^900, so that those down to 2^-1900 keep all their digits. */
export const upscale = 2 ** 900;
export const upscaleBits = 900;

export interface SumLaw {
  /** Adds source x factor, its sums moved up by `shift`; the factor is mantissa 2^exponent, at most about 1. */
  addShifted(source: SumLaw, shift: number, mantissa: number, exponent: number): void;
  /** Leaves out values at the ends below `least`; returns how much was left out. */
  trim(least: number): number;
  /** Sum of all values. */
  mass(): number;
  readonly lowest: number;
  readonly highest: number;
  forEach(visit: (sum: number, value: number) => void): void;
  /** Values held, or room for them. */
  readonly size: number;
  /** 0 where nothing is held. */
  at(sum: number): number;
}

const lowestPower = -1074;
const highestPower = 64;
const powers = Float64Array.from({ length: highestPower - lowestPower + 1 }, (_, k) => 2 ** (k + lowestPower));

/** 2^exponent for whole exponents up to 64; 0 below the range of doubles. */
export const powerOfTwo = (exponent: number): number => (exponent < lowestPower ? 0 : powers[exponent - lowestPower]!);

/** Beyond this a power of two is applied in two steps, so that what is left of a product does not depend on their order. */
const deepest = 1000;

export class DenseLaw implements SumLaw {
  /** The values stand in a buffer shared by the nodes of a stage: a hundred thousand small arrays would cost more than they hold. */
  private constructor(
    private readonly buffer: Float64Array,
    private start: number,
    public lowest: number,
    public highest: number,
  ) {}

  static single(): DenseLaw {
    return new DenseLaw(Float64Array.of(upscale), 0, 0, 0);
  }

  static many(lowest: ArrayLike<number>, highest: ArrayLike<number>): DenseLaw[] {
    let length = 0;
    const starts = Array.from(lowest, (low, k) => {
      const start = length;
      length += highest[k]! - low + 1;
      return start;
    });
    const buffer = new Float64Array(length);
    return starts.map((start, k) => new DenseLaw(buffer, start, lowest[k]!, highest[k]!));
  }

  addShifted(source: DenseLaw, shift: number, mantissa: number, exponent: number): void {
    const from = source.buffer;
    const into = this.buffer;
    const offset = this.start + source.lowest + shift - this.lowest - source.start;
    const end = source.start + source.highest - source.lowest;
    if (exponent >= -deepest) {
      const factor = mantissa * powerOfTwo(exponent);
      for (let k = source.start; k <= end; k++) into[offset + k]! += from[k]! * factor;
      return;
    }
    const [first, second] = [mantissa * 2 ** -deepest, powerOfTwo(exponent + deepest)];
    for (let k = source.start; k <= end; k++) into[offset + k]! += from[k]! * first * second;
  }

  trim(least: number): number {
    const { buffer } = this;
    let left = 0;
    while (this.highest > this.lowest && buffer[this.start]! < least) {
      left += buffer[this.start++]!;
      this.lowest++;
    }
    let end = this.start + this.highest - this.lowest;
    while (this.highest > this.lowest && buffer[end]! < least) {
      left += buffer[end--]!;
      this.highest--;
    }
    return left;
  }

  get size(): number {
    return this.highest - this.lowest + 1;
  }

  mass(): number {
    let mass = 0;
    const end = this.start + this.highest - this.lowest;
    for (let k = this.start; k <= end; k++) mass += this.buffer[k]!;
    return mass;
  }

  forEach(visit: (sum: number, value: number) => void): void {
    for (let sum = this.lowest; sum <= this.highest; sum++) visit(sum, this.at(sum));
  }

  at(sum: number): number {
    return sum < this.lowest || sum > this.highest ? 0 : this.buffer[this.start + sum - this.lowest]!;
  }
}

export class SparseLaw implements SumLaw {
  private readonly values = new Map<number, number>();

  private constructor(
    readonly lowest: number,
    readonly highest: number,
  ) {}

  static many(lowest: ArrayLike<number>, highest: ArrayLike<number>): SparseLaw[] {
    return Array.from(lowest, (low, k) => new SparseLaw(low, highest[k]!));
  }

  static single(): SparseLaw {
    const law = new SparseLaw(0, 0);
    law.values.set(0, upscale);
    return law;
  }

  addShifted(source: SparseLaw, shift: number, mantissa: number, exponent: number): void {
    const { values } = this;
    const [first, second] =
      exponent >= -deepest
        ? [mantissa * powerOfTwo(exponent), 1]
        : [mantissa * 2 ** -deepest, powerOfTwo(exponent + deepest)];
    for (const [sum, value] of source.values) {
      values.set(sum + shift, (values.get(sum + shift) ?? 0) + value * first * second);
    }
  }

  trim(least: number): number {
    let left = 0;
    if (least === 0) return left;
    for (const [sum, value] of this.values) {
      if (value >= least || this.values.size === 1) continue;
      left += value;
      this.values.delete(sum);
    }
    return left;
  }

  get size(): number {
    return this.values.size;
  }

  mass(): number {
    let mass = 0;
    for (const value of this.values.values()) mass += value;
    return mass;
  }

  forEach(visit: (sum: number, value: number) => void): void {
    this.values.forEach((value, sum) => visit(sum, value));
  }

  at(sum: number): number {
    return this.values.get(sum) ?? 0;
  }
}
