// The serial test of Besag & Clifford (1989): the observed table is put at a place drawn at random in a chain at rest, which is run backwards
// to its beginning and forwards to its end. Under the null its rank among the tables of the chain is then as likely as any other, however
// slowly the chain mixes, so that (b + 1) / (m + 1) is a valid p.
import { blockStream } from '../../random/stream.js';
import type { Place } from '../../statistic/contract.js';
import type { SampledCut } from '../contract.js';
import type { Move } from './moves.js';
import { Walk } from './walk.js';

export interface ChainPlan {
  readonly seed: string;
  readonly tableKey: string;
  /** Tables compared with the observed one. */
  readonly tables: number;
  /** Steps between two of them. */
  readonly stepsBetween: number;
}

/** Numbered streams: 0 draws the place, 1 runs forwards, 2 backwards. */
export function serialCut(
  observed: Float64Array,
  moves: readonly Move[],
  expected: Float64Array,
  { seed, tableKey, tables, stepsBetween }: ChainPlan,
  place: (counts: Float64Array) => Place,
): SampledCut {
  const before = Math.floor(blockStream(seed, tableKey, 0).uniform() * (tables + 1));
  const sums: [number, number, number] = [0, 0, 0];
  for (const [block, length] of [
    [1, tables - before],
    [2, before],
  ] as const) {
    const stream = blockStream(seed, tableKey, block);
    const walk = new Walk(observed, moves, expected);
    for (let table = 0; table < length; table++) {
      for (let step = 0; step < stepsBetween; step++) walk.step(stream);
      sums[place(walk.counts) + 1]!++;
    }
  }
  const [below, tied, above] = sums;
  return { kind: 'sampled', ordering: 'upper', below, tied, above, draws: tables };
}
