// Kappa as a measure of agreement with its interval: kappa -/+ z times the standard error of Fleiss, Cohen & Everitt (1969), at most 1.
import type { Effect } from '../effect/contract.js';
import { kappaMoments, agreementOf } from '../statistic/kappa-moments.js';
import { weightsOf } from '../statistic/kappa.js';
import { liveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';

/** @param name kappa, kappa-linear or kappa-quadratic; @param z normal quantile of the level. */
export function kappaEffect(table: Table, name: string, confidence: number, z: number): Effect {
  const live = liveTable(table);
  const { kappa, error } = kappaMoments(live, agreementOf(weightsOf(name), table.rowLabels.length), live.counts);
  const method = 'fleiss-cohen-everitt';
  if (Number.isNaN(kappa)) {
    const reason = 'one-level-only' as const;
    return { name, estimate: null, reason, intervals: [{ method, confidence, lower: null, upper: null, reason }] };
  }
  const limits =
    error > 0
      ? { lower: Math.max(-1, kappa - z * error), upper: Math.min(1, kappa + z * error) }
      : { lower: null, upper: null, reason: 'zero-variance' as const };
  return { name, estimate: kappa, intervals: [{ method, confidence, ...limits, guaranteed: false }] };
}
