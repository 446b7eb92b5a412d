// The measures of effect of a table: those of two groups for a 2x2 table, those of association for a larger one.
import type { Plan } from '../plan/plan.js';
import type { NamedRoles } from '../plan/roles.js';
import type { LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';
import type { Effect } from './contract.js';

/** @param named roles where there are two groups, else null. */
export async function effectsOf(
  table: Table,
  live: LiveTable,
  named: NamedRoles | null,
  plan: Plan,
): Promise<Effect[]> {
  const settings = { confidence: plan.confidence };
  if (named !== null && named.referenceLabel !== null) {
    const { twoByTwoEffects } = await import('./two-by-two-effects.js');
    const hasFixedGroups = plan.fixed === named.groups && plan.method === 'exact';
    return twoByTwoEffects(table, named, hasFixedGroups ? { ...settings, exactWork: plan.effort } : settings);
  }
  const { tableEffects } = await import('./larger/table-effects.js');
  const { bootstrap, seed, tableKey } = plan;
  return tableEffects(
    live,
    settings,
    bootstrap === undefined || seed === null ? null : { draws: bootstrap, seed, tableKey },
  );
}
