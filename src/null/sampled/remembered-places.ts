// Places that are asked for once and then remembered, within stated memory: that saves time and changes no answer.
import type { Place } from '../../statistic/contract.js';
import type { LiveTable } from '../../table/live-table.js';
import type { Cells } from './cells.js';
import type { DrawPlan } from './draw-plan.js';
import { leastOf, mostOf, rangeAround, spreadOf } from './hypergeometric/spread.js';
import { cornerEntries, decidedEntries } from './limits.js';

/** Where a drawn table stands beside the observed one. */
export interface Judge {
  /** @param table its cells in the order of drawing. */
  place(table: Cells): Place;
}

/** Asks about a table in the live table's own order. */
export type Decide = (counts: Float64Array) => Place;

const unknown = 2;

/** A 2x2 table is one of its counts: places are kept by the first one drawn. */
export class ByCorner implements Judge {
  private readonly positions: readonly number[];
  private readonly from: number;
  private readonly places: Int8Array;
  private readonly arranged = new Float64Array(4);

  constructor(
    live: LiveTable,
    private readonly decide: Decide,
    { positions }: DrawPlan,
    share: number,
  ) {
    this.positions = positions;
    const row = live.rowTotals[positions[0]! >> 1]!;
    const column = live.columnTotals[positions[0]! & 1]!;
    const spread = spreadOf(live.total, row, column);
    const half = Math.min(rangeAround(spread, 8).length / 2 + 8, cornerEntries / share / 2 - 1);
    this.from = Math.max(leastOf(live.total, row, column), Math.floor(spread.mean - half));
    const to = Math.min(mostOf(row, column), Math.floor(spread.mean + half));
    this.places = new Int8Array(Math.max(0, to - this.from + 1)).fill(unknown);
  }

  place(table: Cells): Place {
    const k = table[0]! - this.from;
    const kept = k >= 0 && k < this.places.length;
    if (kept && this.places[k] !== unknown) return this.places[k] as Place;
    arrange(table, this.positions, this.arranged);
    const place = this.decide(this.arranged);
    if (kept) this.places[k] = place;
    return place;
  }
}

/** Asks for every table; answers for the observed table and for those asked about lately come from memory. */
export class ByMemory implements Judge {
  private readonly positions: readonly number[];
  private readonly observed: Float64Array;
  /** Tables asked about, one in each slot, and their places. */
  private readonly tables: Float64Array;
  private readonly places: Int8Array;
  private readonly arranged: Float64Array;

  constructor(
    live: LiveTable,
    private readonly decide: Decide,
    { positions }: DrawPlan,
    share: number,
  ) {
    this.positions = positions;
    this.observed = Float64Array.from(positions, (position) => live.counts[position]!);
    const slots = 2 ** Math.floor(Math.log2(Math.max(1, decidedEntries / share / positions.length)));
    this.tables = new Float64Array(slots * positions.length);
    this.places = new Int8Array(slots).fill(unknown);
    this.arranged = new Float64Array(positions.length);
  }

  place(table: Cells): Place {
    if (holds(this.observed, 0, table)) return 0;
    const { tables, places } = this;
    const slot = hashOf(table) & (places.length - 1);
    const start = slot * table.length;
    if (places[slot] !== unknown && holds(tables, start, table)) return places[slot] as Place;
    arrange(table, this.positions, this.arranged);
    const place = this.decide(this.arranged);
    tables.set(table, start);
    places[slot] = place;
    return place;
  }
}

function arrange(table: Cells, positions: readonly number[], into: Float64Array): void {
  for (let cell = 0; cell < positions.length; cell++) into[positions[cell]!] = table[cell]!;
}

function holds(tables: Float64Array, start: number, table: Cells): boolean {
  for (let cell = 0; cell < table.length; cell++) if (tables[start + cell] !== table[cell]) return false;
  return true;
}

function hashOf(table: Cells): number {
  let hash = 0;
  for (let cell = 0; cell < table.length; cell++) hash = Math.imul(hash ^ table[cell]!, 0x9e3779b1) ^ (hash >>> 15);
  return hash ^ (hash >>> 13);
}
