// Adjusted lines for programs and spreadsheets.
import { shown } from '../result/label-words.js';
import type { AdjustedLine } from '../result/adjusted-declaration.js';

export function adjustedLines(lines: readonly AdjustedLine[], format: 'ndjson' | 'csv'): string {
  if (format === 'ndjson') return lines.map((line) => `${JSON.stringify(line)}\n`).join('');
  const methods = [
    ...new Set(lines.flatMap(({ adjusted }) => Object.keys(adjusted))),
  ] as (keyof AdjustedLine['adjusted'])[];
  const header = ['key', 'family', 'tests', 'p', 'leastAttainable', ...methods];
  const rows = lines.map(({ key, family, tests, p, leastAttainable, adjusted }) => [
    field(key),
    field(family),
    tests,
    p ?? '',
    leastAttainable ?? '',
    ...methods.map((method) => adjusted[method] ?? ''),
  ]);
  return [header, ...rows].map((row) => `${row.join(',')}\n`).join('');
}

/** Quoted where CSV needs it, and disarmed where a spreadsheet would run it. */
function field(words: string): string {
  const text = (/^[=+\-@\t\r\n]/.test(words) ? "'" : '') + shown(words);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
