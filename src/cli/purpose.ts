// What the first screen says of keepsum, and the examples that it shows; a test runs every one.
import type { Example } from './commands/command-file.js';

export const purpose =
  'keepsum tells whether the rows and columns of a table of counts are related, with a p-value that states its own error.';

export const rootExamples: readonly Example[] = [
  { line: 'keepsum test 8,2 1,9', words: 'a table typed in, one word a row' },
  { line: 'keepsum test fixtures/demo/orchid-forms.tsv', words: 'a table from a file' },
  { line: 'keepsum batch fixtures/demo/shift-checks.ndjson', words: 'many tables' },
];
