// Measures of association of a table with more than two rows or columns that know no order, in the order of a result.
// Lines without counts hold no unit and are left out.
import { hasOneTableOnly, type LiveTable } from '../../table/live-table.js';
import type { Effect } from '../contract.js';
import { approximateInterval, type EffectSettings } from '../two-groups.js';
import { bootstrapLimits, type Resampling } from './bootstrap.js';
import { correctedCramerV, cramerV } from './cramer-v.js';
import { predictionEffects } from './prediction.js';

/** @param resampling of the bootstrap interval; without it there is none. O(cells) but for that. */
export function tableEffects(live: LiveTable, settings: EffectSettings, resampling: Resampling | null): Effect[] {
  if (hasOneTableOnly(live)) {
    return [{ name: 'cramer-v', estimate: null, reason: 'one-level-only', intervals: [] }];
  }
  return [
    { name: 'cramer-v', estimate: cramerV(live), intervals: [] },
    corrected(live, settings, resampling),
    ...predictionEffects(live, settings),
  ];
}

function corrected(live: LiveTable, settings: EffectSettings, resampling: Resampling | null): Effect {
  const name = 'cramer-v-corrected';
  const estimate = correctedCramerV(live);
  if (estimate === undefined) return { name, estimate: null, reason: 'zero-variance', intervals: [] };
  if (resampling === null) return { name, estimate, intervals: [] };
  const measure = (one: LiveTable): number | undefined => (hasOneTableOnly(one) ? undefined : correctedCramerV(one));
  const limits = bootstrapLimits(live, measure, 0, settings.confidence, resampling);
  return {
    name,
    estimate,
    intervals: [{ ...approximateInterval('bootstrap', settings, limits), draws: resampling.draws }],
  };
}
