// The odds ratio of the sample, a d / (b c), with the interval of Woolf (1955). Nothing is added to an empty cell.
import { zOfConfidence } from '../numeric/normal-quantile.js';
import type { Effect, EffectReason, Interval } from './contract.js';
import {
  approximateInterval,
  emptyGroup,
  estimateOf,
  noEvents,
  noInterval,
  onlyEvents,
  type EffectSettings,
  type TwoGroups,
} from './two-groups.js';

/** Odds of the event in the first group over those in the second: 0 to infinity, 1 for none. */
export function oddsRatio(groups: TwoGroups, settings: EffectSettings): Effect {
  return {
    name: 'odds-ratio',
    ...estimateOf(sampleOddsRatio(groups)),
    direction: 'first-over-second',
    intervals: [woolf(groups, settings)],
  };
}

const cellsOf = ({ first, second }: TwoGroups): [number, number, number, number] => [
  first.events,
  first.size - first.events,
  second.events,
  second.size - second.events,
];

function sampleOddsRatio(groups: TwoGroups): number | EffectReason {
  const empty = emptyGroup(groups);
  if (empty !== undefined) return empty;
  if (noEvents(groups)) return 'no-events';
  if (onlyEvents(groups)) return 'only-events';
  const [a, b, c, d] = cellsOf(groups);
  if (b === 0 || c === 0) return Infinity;
  return (a / b) * (d / c);
}

/** exp(ln OR +- z sqrt(1/a + 1/b + 1/c + 1/d)); none where a cell is empty. */
function woolf(groups: TwoGroups, settings: EffectSettings): Interval {
  const cells = cellsOf(groups);
  if (cells.includes(0)) return noInterval('woolf', settings, emptyGroup(groups) ?? 'zero-cell');
  const [a, b, c, d] = cells;
  const centre = Math.log(a / b) + Math.log(d / c);
  const half = zOfConfidence(settings.confidence) * Math.sqrt(1 / a + 1 / b + 1 / c + 1 / d);
  return approximateInterval('woolf', settings, [Math.exp(centre - half), Math.exp(centre + half)]);
}
