// Which questions an order of rows, of columns or of both lets one ask, and which statistic asks each.
import type { Plan } from '../plan/plan.js';
import { statistics } from '../statistic/registry.js';
import type { LiveTable } from '../table/live-table.js';

export const orderedSides = ['rows', 'columns', 'both'] as const;
export type Ordered = (typeof orderedSides)[number];

export const asks = ['any-departure', 'rise-together', 'rise-of-any-shape', 'groups-on-a-scale'] as const;
export type Asks = (typeof asks)[number];

export interface OrderQuestion {
  readonly asks: Asks;
  readonly statistic: string;
  readonly groups?: 'rows' | 'columns';
  /** The declared scores that it reads. */
  readonly reads: readonly ('rowScores' | 'columnScores')[];
}

/** The sides in order: as declared, or as the statistic takes them; two levels are always in order. */
export function orderOf(live: LiveTable, { ordered, statistic, groups }: Plan): Ordered | undefined {
  const side = ordered ?? impliedBy(statistic, groups);
  if (side === undefined || side === 'both') return side;
  const other = side === 'rows' ? live.columns : live.rows;
  return other === 2 ? 'both' : side;
}

function impliedBy(statistic: string, groups: Plan['groups']): Ordered | undefined {
  switch (asksOf(statistic)) {
    case 'rise-together':
    case 'rise-of-any-shape':
      return 'both';
    case 'groups-on-a-scale':
      return groups === 'columns' ? 'rows' : 'columns';
    default:
      return undefined;
  }
}

/** What a statistic asks; one of the user's own is taken as it is and asks nothing that we know. */
export function asksOf(statistic: string): Asks | undefined {
  switch (statistic) {
    case 'trend':
      return 'rise-together';
    case 'isotonic-trend':
      return 'rise-of-any-shape';
    case 'kruskal-wallis':
      return 'groups-on-a-scale';
    default:
      return statistics.some(({ name, sided }) => name === statistic && sided === 'upper')
        ? 'any-departure'
        : undefined;
  }
}

/** Those that the headline does not ask. */
export function questionsBeside(live: LiveTable, plan: Plan, ordered: Ordered): OrderQuestion[] {
  const all = ordered === 'both' ? ofBoth(live, plan.groups) : ofOne(ordered);
  const headline = asksOf(plan.statistic);
  return all.filter(
    (question) =>
      question.asks !== headline && !(plan.methodAsked === 'asymptotic' && question.asks === 'rise-of-any-shape'),
  );
}

/** The groups whose rise may have any shape are the side with more levels. */
function ofBoth(live: LiveTable, told: Plan['groups']): OrderQuestion[] {
  const groups = told ?? (live.columns > live.rows ? 'columns' : 'rows');
  return [
    { asks: 'any-departure', statistic: 'pearson', reads: [] },
    { asks: 'rise-together', statistic: 'trend', reads: ['rowScores', 'columnScores'] },
    {
      asks: 'rise-of-any-shape',
      statistic: 'isotonic-trend',
      groups,
      reads: [groups === 'rows' ? 'columnScores' : 'rowScores'],
    },
  ];
}

const ofOne = (ordered: 'rows' | 'columns'): OrderQuestion[] => [
  { asks: 'any-departure', statistic: 'pearson', reads: [] },
  {
    asks: 'groups-on-a-scale',
    statistic: 'kruskal-wallis',
    groups: ordered === 'rows' ? 'columns' : 'rows',
    reads: [ordered === 'rows' ? 'rowScores' : 'columnScores'],
  },
];
