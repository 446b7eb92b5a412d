// What every measure of effect hands on: an estimate with its intervals, missing values named.

/** Why an estimate or a limit has no value, or is infinite. */
export const effectReasons = [
  'empty-group',
  'no-events',
  'only-events',
  'zero-cell',
  'zero-variance',
  'only-one-table',
  'one-level-only',
  'no-discordant-pairs',
  /** The count is the least or the greatest that these margins allow: one side of the interval is open. */
  'at-boundary',
  /** The interval of the difference holds 0, so that of its reciprocal runs through infinity. */
  'difference-may-be-zero',
  /** Two levels share the most counts, so that the measure has a kink and no normal limit. */
  'tied-maximum',
  /** More work than is allowed for one interval. */
  'beyond-effort',
] as const;
export type EffectReason = (typeof effectReasons)[number];

export type Extended = number | 'infinity' | '-infinity';

export interface Interval {
  readonly method: string;
  /** In (0, 1). */
  readonly confidence: number;
  readonly lower: Extended | null;
  readonly upper: Extended | null;
  readonly reason?: EffectReason;
  /** The two-sided rule or test whose p-values the interval inverts. */
  readonly invertsP?: string;
  /** The values not rejected form more than one piece, and the interval is their hull. */
  readonly setHasGap?: boolean;
  /** False when coverage of the stated level is not promised. */
  readonly guaranteed?: boolean;
  /** The interval runs from `lower` up to infinity and from minus infinity up to `upper` (Altman 1998). */
  readonly throughInfinity?: boolean;
  /** Resampled tables behind it. */
  readonly draws?: number;
}

export interface Effect {
  /** odds-ratio, conditional-odds-ratio, risk-ratio, risk-difference, cramer-v, gamma, tau-b, kappa, ... */
  readonly name: string;
  readonly estimate: Extended | null;
  readonly reason?: EffectReason;
  readonly groups?: 'rows' | 'columns';
  readonly event?: string;
  readonly direction?: 'first-minus-second' | 'first-over-second';
  /** Which side is foretold from the other; `either` for the symmetric form. */
  readonly predicts?: 'rows' | 'columns' | 'either';
  readonly intervals: readonly Interval[];
}

export const extended = (value: number): Extended =>
  value === Infinity ? 'infinity' : value === -Infinity ? '-infinity' : value;

export const asNumber = (value: Extended): number =>
  value === 'infinity' ? Infinity : value === '-infinity' ? -Infinity : value;
