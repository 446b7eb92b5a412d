// Remarks on a table with impossible cells.
import type { Plan } from '../plan/plan.js';
import type { FreeCells } from '../table/free-cells.js';
import type { Table } from '../table/table.js';
import { quoted } from './label-words.js';
import type { Note } from './result.js';

export function quasiNotes(table: Table, plan: Plan, { blocks, heldAtZero, degreesOfFreedom }: FreeCells): Note[] {
  const impossible = table.impossible!.flat().filter(Boolean).length;
  const width = table.columnLabels.length;
  const named = heldAtZero.map(
    (cell) => `${quoted(table.rowLabels[Math.floor(cell / width)]!)} with ${quoted(table.columnLabels[cell % width]!)}`,
  );
  return [
    {
      code: 'impossible-cells',
      text: `${impossible} cell${impossible === 1 ? ' was' : 's were'} declared impossible (-): independence is tested in the others (quasi-independence).`,
    },
    ...(named.length === 0
      ? []
      : [
          {
            code: 'held-at-zero',
            text: `The margins leave these possible cells no count, so they take no part: ${named.join(', ')}.`,
          },
        ]),
    ...(blocks.length < 2
      ? []
      : [
          {
            code: 'separable-blocks',
            text: `The table falls apart into ${blocks.length} blocks that say nothing about each other; degrees of freedom are added up over them (Goodman 1968).`,
          },
        ]),
    ...(degreesOfFreedom === 0
      ? [
          {
            code: 'only-one-table',
            text: 'These margins and impossible cells allow one table only, so chance has nothing to decide and p is 1.',
          },
        ]
      : []),
    ...(plan.statistic === 'pearson' && plan.method !== 'asymptotic' && degreesOfFreedom > 0
      ? [
          {
            code: 'ties-to-nine-digits',
            text: 'Expected counts under quasi-independence are no fractions: values of the statistic that agree to nine digits were counted as ties, which can only make p larger (likelihood-ratio decides them exactly).',
          },
        ]
      : []),
  ];
}
