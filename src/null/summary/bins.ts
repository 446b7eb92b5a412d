// From atoms of a law to bins: what each holds, how much of that is in the tail, and what the approximation would put there.
import { edgesFor, type Atom, type Edges } from './edges.js';

export type End = number | 'infinity' | '-infinity';

export interface Bin {
  readonly from: End;
  readonly to: End;
  /** Probability of the bin, and the part of it that is at least as extreme as the observed table. */
  readonly mass: number;
  readonly inTail: number;
  /** What the limiting law puts there, where the statistic has one. */
  readonly approximation?: number;
}

export interface BinWishes {
  readonly observed: number;
  readonly outward: 1 | -1;
  /** P(X <= x) of the limiting law. */
  readonly approximate?: ((x: number) => number) | undefined;
  /** The least value there is, where the statistic has one. */
  readonly least?: number | undefined;
}

/** Bins in ascending order; masses add up to that of the atoms. */
export function binsFor(atoms: readonly Atom[], { observed, outward, approximate, least }: BinWishes): Bin[] {
  const finite = atoms.filter(({ value }) => Number.isFinite(value));
  if (finite.length === 0) return [];
  const edges = edgesFor(finite, Number.isFinite(observed) ? observed : finite.at(-1)!.value, outward);
  const held = Array.from({ length: edges.number }, () => ({ mass: 0, inTail: 0 }));
  for (const { value, mass, inTail } of atoms) {
    const bin = held[placeOf(value, edges, inTail > 0, outward)]!;
    bin.mass += mass;
    bin.inTail += inTail;
  }
  const lowest = atoms[0]!.value;
  const highest = atoms.at(-1)!.value;
  const end = edges.start + edges.number * edges.width;
  return held.map(({ mass, inTail }, k) => {
    const [left, right] = [edges.start + k * edges.width, edges.start + (k + 1) * edges.width];
    const opensDown = k === 0 && lowest < left - edges.width * 1e-6;
    const opensUp = k === edges.number - 1 && highest > end + edges.width * 1e-6;
    const from = opensDown ? '-infinity' : least === undefined ? left : Math.max(least, left);
    const to = opensUp ? 'infinity' : right;
    return {
      from,
      to,
      mass,
      inTail,
      ...(approximate === undefined ? {} : { approximation: between(approximate, from, to) }),
    };
  });
}

function between(approximate: (x: number) => number, from: End, to: End): number {
  const upTo = (end: End): number => (end === 'infinity' ? 1 : end === '-infinity' ? 0 : approximate(end));
  return Math.max(0, upTo(to) - upTo(from));
}

/** A value on an edge belongs to the side on which it is as extreme as it is. */
function placeOf(value: number, { start, width, number }: Edges, isTail: boolean, outward: 1 | -1): number {
  if (value === -Infinity) return 0;
  if (value === Infinity) return number - 1;
  const nudge = 1e-6 * (isTail ? outward : -outward);
  return Math.min(number - 1, Math.max(0, Math.floor((value - start) / width + nudge)));
}
