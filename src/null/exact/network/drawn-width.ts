// How wide an interval draws would leave, for the work that they are worth: what a bracket is held against.
import type { LiveTable } from '../../../table/live-table.js';
import { planDraws } from '../../sampled/draw-plan.js';

/** Normal quantile of 99% intervals. */
const z = 2.5758293035489004;
/** Nanoseconds to judge a drawn table, and in a unit of forecast.ts. */
const judging = 30;
const perUnit = 30;

/** Draws worth so many units of exact work, by the forecast of the sampler. */
export const drawsWorth = (live: LiveTable, units: number): number =>
  Math.max(1, (units * perUnit) / (planDraws(live).work + judging));

/**
 * Width of the 99% interval for a probability p from that many draws, by Wilson's (1927) form: a little narrower than the
 * limits of Clopper & Pearson that a sampled p gets.
 */
export function drawnWidth(p: number, draws: number): number {
  return ((2 * z) / (draws + z * z)) * Math.sqrt(draws * p * (1 - p) + (z * z) / 4);
}

/** The narrowest that draws could be expected to make it where p lies from `lower` to `upper`. */
export const narrowestDrawn = (lower: number, upper: number, draws: number): number =>
  Math.min(drawnWidth(lower, draws), drawnWidth(upper, draws));
