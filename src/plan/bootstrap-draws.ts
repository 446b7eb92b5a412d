// How many tables a parametric bootstrap draws: a fixed number.
import type { LiveTable } from '../table/live-table.js';
import type { PlanOptions } from './plan.js';
import { unused, wholeNumber } from './settings.js';

export const standardBootstrapDraws = 100_000;

/** @throws Problem (usage) for options of draws until settled. */
export function bootstrapDraws(options: PlanOptions, live: LiveTable): number {
  const { draws } = options;
  for (const [option, value] of [
    ['--draws auto', draws === 'auto' ? draws : undefined],
    ['--most-draws', options.mostDraws],
    ['--sampling-risk', options.samplingRisk],
    ['--relative-error', options.relativeError],
  ] as const) {
    if (value === undefined) continue;
    throw unused(option, 'with a parametric bootstrap, which draws a fixed number', 'leave it out, or use --draws N');
  }
  if (draws !== undefined && draws !== 'auto') return wholeNumber(draws, 1, 1e12, '--draws');
  // Large tables take longer for each draw.
  return live.rows * live.columns <= 100 ? standardBootstrapDraws : 10_000;
}
