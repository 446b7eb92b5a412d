// One stratum of a 2x2xK table as the odds-ratio methods see it: first group and event give the corner.
import type { Roles } from '../../statistic/contract.js';

/** Counts with the groups as rows: [first group: event, other; second group: event, other]. */
export interface Stratum {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly d: number;
  /** a + b, c + d, a + c, b + d and their sum. */
  readonly first: number;
  readonly second: number;
  readonly events: number;
  readonly others: number;
  readonly total: number;
}

/** @param counts two rows of two counts, in the order of the live lines of the pooled table. */
export function stratumOf(counts: readonly (readonly number[])[], { groups, event, first }: Roles): Stratum {
  const cell = (group: number, level: number): number =>
    (groups === 'rows' ? counts[group]?.[level] : counts[level]?.[group]) ?? 0;
  const a = cell(first, event);
  const b = cell(first, 1 - event);
  const c = cell(1 - first, event);
  const d = cell(1 - first, 1 - event);
  return { a, b, c, d, first: a + b, second: c + d, events: a + c, others: b + d, total: a + b + c + d };
}

/** Smallest and largest corner count that the margins of a stratum allow. */
export const lowestCorner = ({ first, events, total }: Stratum): number => Math.max(0, first + events - total);
export const highestCorner = ({ first, events }: Stratum): number => Math.min(first, events);

/** True when the margins leave a stratum more than one table; the others say nothing of a common odds ratio. */
export const speaks = (stratum: Stratum): boolean => lowestCorner(stratum) < highestCorner(stratum);
