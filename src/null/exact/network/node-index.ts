// From a node's number to its place in a level: a plain table while numbers are small, open addressing beyond.

/** Beyond this many possible numbers a plain table would cost more to clear than it saves. */
const largestPlainTable = 2 ** 20;

/** -1 stands for "not there". */
export class NodeIndex {
  /** Place by number, or null when numbers are too large for a plain table. */
  readonly plain: Int32Array | null;
  private mask = 2 ** 12 - 1;
  private numbers: Float64Array;
  private places: Int32Array;
  private used = 0;

  /** @param size one more than the largest number. */
  constructor(size: number) {
    this.plain = size <= largestPlainTable ? new Int32Array(size).fill(-1) : null;
    const slots = this.plain === null ? this.mask + 1 : 0;
    this.numbers = new Float64Array(slots).fill(-1);
    this.places = new Int32Array(slots);
  }

  get(number: number): number {
    if (this.plain !== null) return this.plain[number]!;
    const at = this.slot(number);
    return this.numbers[at] === -1 ? -1 : this.places[at]!;
  }

  set(number: number, place: number): void {
    if (this.plain !== null) {
      this.plain[number] = place;
      return;
    }
    if (2 * ++this.used > this.mask) this.enlarge();
    const at = this.slot(number);
    this.numbers[at] = number;
    this.places[at] = place;
  }

  /** Slot that holds the number or is free for it; numbers are spread by multiplying their low and high halves (Knuth). */
  private slot(number: number): number {
    const high = (number / 4294967296) | 0;
    const low = (number - high * 4294967296) | 0;
    let at = Math.imul(low, 0x9e3779b1) ^ Math.imul(high + 1, 0x85ebca6b);
    at = (at ^ (at >>> 15)) & this.mask;
    const { numbers, mask } = this;
    for (;;) {
      const held = numbers[at]!;
      if (held === number || held === -1) return at;
      at = (at + 1) & mask;
    }
  }

  private enlarge(): void {
    const { numbers, places } = this;
    this.mask = this.mask * 2 + 1;
    this.numbers = new Float64Array(this.mask + 1).fill(-1);
    this.places = new Int32Array(this.mask + 1);
    numbers.forEach((number, at) => {
      if (number === -1) return;
      const to = this.slot(number);
      this.numbers[to] = number;
      this.places[to] = places[at]!;
    });
  }
}
