// All measures of effect of a 2x2 table, in the order of a result.
import type { NamedRoles } from '../plan/roles.js';
import type { Table } from '../table/table.js';
import { conditionalOddsRatio } from './conditional/conditional-odds-ratio.js';
import type { Effect } from './contract.js';
import { withExactInterval } from './exact-unconditional.js';
import { attributableFraction, numberNeeded } from './from-ratio-and-difference.js';
import { oddsRatio } from './odds-ratio.js';
import { riskDifference } from './risk-difference.js';
import { riskRatio } from './risk-ratio.js';
import { twoGroupsOf, type EffectSettings } from './two-groups.js';

/** @param named which lines are the groups and which level is the event. Time: well under 0.1 s up to totals of 1e7. */
export function twoByTwoEffects(table: Table, named: NamedRoles, settings: EffectSettings): Effect[] {
  const groups = twoGroupsOf(table, named);
  const { exactWork, confidence } = settings;
  const exact = (effect: Effect, of: 'difference' | 'ratio'): Effect =>
    exactWork === undefined ? effect : withExactInterval(effect, of, groups, { confidence, effort: exactWork });
  const difference = exact(riskDifference(groups, settings), 'difference');
  const ratio = exact(riskRatio(groups, settings), 'ratio');
  return [
    difference,
    ratio,
    oddsRatio(groups, settings),
    conditionalOddsRatio(groups, settings),
    numberNeeded(difference),
    attributableFraction(ratio),
  ].map((effect) => ({ ...effect, groups: named.groups, event: named.eventLabel }));
}
