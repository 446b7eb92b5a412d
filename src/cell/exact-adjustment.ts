// Exact adjusted p-values: the tables in which some cell leaves its limits, by the engine that counts those in which none does.
import { exactWithinLimits, forecastWithinLimits } from '../null/exact/within-limits.js';
import type { LiveTable } from '../table/live-table.js';
import type { AdjustedP } from './adjusted-p.js';
import { log2POf } from './compare-p.js';
import { limitsFor, type Thresholds } from './thresholds.js';

/** The engine's start, which is paid once. */
const start = 3e5;
/** Deeper than the engine goes; log2. */
const deepest = -900;

/** In the units of null/forecast.ts; Infinity where the engine does not apply. */
export function forecastExactAdjustment(live: LiveTable, thresholds: Thresholds): number {
  return thresholds.places
    .filter((place) => log2POf(place) < 0)
    .reduce((work, place) => work + forecastWithinLimits(live, limitsFor(thresholds, place)) - start, start);
}

/** One for each threshold; rising with it. */
export function exactAdjustment(live: LiveTable, thresholds: Thresholds): AdjustedP[] {
  let least = 0;
  return thresholds.places.map((place): AdjustedP => {
    const log2 = log2POf(place);
    if (log2 < deepest) return { p: null, reason: 'underflow', method: 'exact' };
    if (log2 === 0) return { p: 1, method: 'exact', error: { kind: 'rounding', relative: 0 } };
    const limits = limitsFor(thresholds, place);
    const [cut] = exactWithinLimits(live, [{ name: 'upper', place: () => 0, limits }]);
    const { above, relativeError } = cut!;
    least = Math.max(least, Math.min(1, above.value));
    return { p: least, method: 'exact', error: { kind: 'rounding', relative: relativeError } };
  });
}
