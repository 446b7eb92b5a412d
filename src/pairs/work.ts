// What the exact answer to each statistic of change would take, and the values of those statistics.
import type { PairsWork } from '../plan/pairs-plan.js';
import { forecastBowker } from './bowker-exact.js';
import { forecastHomogeneity } from './homogeneity-exact.js';
import type { HomogeneityForm } from './homogeneity.js';
import { mcnemarWork } from './mcnemar-exact.js';
import { mostPerPair } from './pair-draws.js';
import type { DiscordantPair } from './square-table.js';

/** (b - c) / sqrt(b + c); 0 where no pair changed. */
export const mcnemarValue = (there: number, back: number): number =>
  there === back ? 0 : (there - back) / Math.sqrt(there + back);

/** Sum of (n_ij - n_ji)^2 / (n_ij + n_ji), over levels between which some pair changed. */
export const bowkerValue = (pairs: readonly DiscordantPair[]): number =>
  pairs.reduce((sum, { there, back }) => sum + (there - back) ** 2 / (there + back), 0);

export function workFor(name: string, pairs: readonly DiscordantPair[], form: HomogeneityForm): PairsWork {
  const tables = pairs.reduce((all, { there, back }) => all * (there + back + 1), 1);
  const shared = { tables, canBeDrawn: pairs.every(({ there, back }) => there + back <= mostPerPair) };
  if (name === 'mcnemar') {
    const { there = 0, back = 0 } = pairs[0] ?? {};
    return { ...shared, engine: 'coin-walk', possible: true, workUnits: mcnemarWork(there, back) };
  }
  if (name === 'bowker') return { ...shared, engine: 'coin-halves', ...forecastBowker(pairs, bowkerValue(pairs)) };
  return { ...shared, engine: 'coin-differences', ...forecastHomogeneity(form, pairs) };
}
