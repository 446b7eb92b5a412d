// What a report on a table with impossible cells adds: the counts that independence in the other cells expects.
import { shown } from '../../result/label-words.js';
import { digits } from '../../result/number-words.js';
import type { Result } from '../../result/result.js';
import type { Section } from '../page.js';

export function quasiSection({ quasiIndependence, input }: Result): Section {
  const heading = 'Expected counts under quasi-independence';
  if (quasiIndependence === undefined) return { heading, blocks: [] };
  const words = (e: number | null): string => (e === null ? '-' : e === 0 ? '0' : digits(e, 3));
  return {
    heading,
    blocks: [
      {
        kind: 'grid',
        headings: ['', ...input.columnLabels.map(shown)],
        rows: quasiIndependence.expected.map((row, i) => [shown(input.rowLabels[i]!), ...row.map(words)]),
      },
    ],
  };
}
