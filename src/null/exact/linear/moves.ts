// The moves of one stage of a network, and the nodes they lead to, in flat arrays: millions of them are made and read once.

/** A list of fixed-width records of numbers that grows by doubling. */
export class Records {
  data: Float64Array;
  length = 0;

  constructor(
    readonly width: number,
    capacity = 256,
  ) {
    this.data = new Float64Array(capacity * width);
  }

  /** Makes room for one more record; returns where it starts in `data`. */
  grow(): number {
    const at = this.length * this.width;
    if (at === this.data.length) {
      const larger = new Float64Array(2 * this.data.length);
      larger.set(this.data);
      this.data = larger;
    }
    this.length++;
    return at;
  }
}

/** Numbers nodes by their code (a whole number from 0 up), in the order in which they are first met. */
export class NodeNumbers {
  private readonly table: Int32Array | null;
  private readonly map: Map<number, number> | null;
  count = 0;

  /** @param codes number of codes there are; up to 4 million a plain table serves (16 MB). */
  constructor(codes: number) {
    this.table = codes <= 2 ** 22 ? new Int32Array(codes) : null;
    this.map = this.table === null ? new Map() : null;
  }

  /** The number of the node, or -1 when it is new; it then gets the number count - 1. */
  find(code: number): number {
    const known = this.table === null ? this.map!.get(code) : this.table[code];
    if (known !== undefined && known > 0) return known - 1;
    this.count++;
    if (this.table === null) this.map!.set(code, this.count);
    else this.table[code] = this.count;
    return -1;
  }

  /** Forgets all nodes; the codes met are needed to do it in time proportional to them. */
  clear(codes: readonly number[]): void {
    if (this.table === null) this.map!.clear();
    else for (const code of codes) this.table[code] = 0;
    this.count = 0;
  }
}
