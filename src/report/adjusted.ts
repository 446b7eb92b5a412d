// Adjusted lines for programs and spreadsheets.
import type { AdjustedLine } from '../result/adjusted-declaration.js';
import { cellText } from './csv.js';

export function adjustedLines(lines: readonly AdjustedLine[], format: 'ndjson' | 'csv'): string {
  if (format === 'ndjson') return lines.map((line) => `${JSON.stringify(line)}\n`).join('');
  const methods = [
    ...new Set(lines.flatMap(({ adjusted }) => Object.keys(adjusted))),
  ] as (keyof AdjustedLine['adjusted'])[];
  const header = ['key', 'family', 'tests', 'p', 'leastAttainable', ...methods];
  const rows = lines.map(({ key, family, tests, p, leastAttainable, adjusted }) => [
    cellText(key, false),
    cellText(family, false),
    tests,
    p ?? '',
    leastAttainable ?? '',
    ...methods.map((method) => adjusted[method] ?? ''),
  ]);
  return [header, ...rows].map((row) => `${row.join(',')}\n`).join('');
}
