// Remarks on a result about pairs.
import type { Plan } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import type { Table } from '../table/table.js';
import { quoted } from './label-words.js';
import type { Note } from './result.js';

export function pairNotes(table: Table, plan: Plan, found: readonly PValueEntry[], nothingChanged: boolean): Note[] {
  return [
    ...(nothingChanged
      ? [{ code: 'no-discordant-pairs', text: 'No pair changed, so there is nothing to test and p is 1.' }]
      : []),
    ...emptyLevels(table),
    ...(exchanged(found)
      ? [
          {
            code: 'tests-exchangeability',
            text: 'Turning pairs round tests exchangeability, that either order of the two answers was as likely for every pair: margins can be alike without it.',
          },
        ]
      : []),
    ...(table.rowLabels.length > 2 && plan.method === 'exact' && !exchanged(found)
      ? [
          {
            code: 'exchange-left-out',
            text: 'Marginal homogeneity has its approximation only here: exact exchange of pairs is over the bound (--statistic marginal-homogeneity draws at random).',
          },
        ]
      : []),
    ...(plan.statistic === 'mcnemar' && !nothingChanged && !found.some(({ method }) => method === 'unconditional')
      ? [
          {
            code: 'unconditional-left-out',
            text: 'The unconditional p was left out: there are more than 100,000 pairs, or it would be too small a number.',
          },
        ]
      : []),
  ];
}

const exchanged = (found: readonly PValueEntry[]): boolean =>
  found.some(({ statistic, method }) => statistic === 'marginal-homogeneity' && method !== 'asymptotic');

function emptyLevels({ rowLabels, rowTotals, columnTotals }: Table): Note[] {
  const empty = rowLabels.filter((_, k) => rowTotals[k] === 0 && columnTotals[k] === 0);
  if (empty.length === 0) return [];
  return [
    {
      code: 'empty-levels-kept',
      text: `No unit falls into these levels, which are kept: ${empty.map(quoted).join(', ')}.`,
    },
  ];
}
