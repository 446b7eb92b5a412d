// What every measure of effect hands on: an estimate with its intervals, missing values named.

/** Why an estimate or a limit has no value. */
export const effectReasons = [
  'empty-group',
  'no-events',
  'only-events',
  'zero-cell',
  'zero-variance',
  'only-one-table',
  'one-level-only',
  'no-discordant-pairs',
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
}

export interface Effect {
  /** odds-ratio, conditional-odds-ratio, risk-ratio, risk-difference, cramer-v, gamma, tau-b, kappa, ... */
  readonly name: string;
  readonly estimate: Extended | null;
  readonly reason?: EffectReason;
  readonly groups?: 'rows' | 'columns';
  readonly event?: string;
  readonly direction?: 'first-minus-second' | 'first-over-second';
  readonly intervals: readonly Interval[];
}

export const extended = (value: number): Extended =>
  value === Infinity ? 'infinity' : value === -Infinity ? '-infinity' : value;
