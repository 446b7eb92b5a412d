// Options that say where the table is and how to read it.
import { anyText, oneOf } from '../../arguments/check-value.js';
import { repeatable, toggle, valued } from '../../arguments/option.js';
import { either } from './words.js';

const delimiters = ['comma', 'semicolon', 'tab', 'pipe'] as const;
const answers = ['yes', 'no', 'detect'] as const;
const missingRules = ['fail', 'drop', 'level'] as const;

export const reading = {
  rowLabels: valued(
    'Reading the table',
    'LABELS',
    anyText,
    'labels of the rows, separated by commas; "a, b" holds a comma',
  ),
  columnLabels: valued('Reading the table', 'LABELS', anyText, 'labels of the columns, likewise'),
  rows: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'raw records: the column of the file that gives the row of each',
  ),
  columns: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'the one that gives the column; both by header name or number',
  ),
  count: valued('Reading the table', 'COLUMN', anyText, 'the one that says how many times a record counts (once)'),
  strata: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'hold these apart: the column that names the stratum; of a table of counts, what its blocks are',
  ),
  cluster: valued(
    'Reading the table',
    'COLUMN',
    anyText,
    'the column that names the cluster (litter, plate, household): clusters are permuted whole',
  ),
  missing: valued(
    'Reading the table',
    'RULE',
    oneOf(missingRules),
    `records that lack a value: ${either(missingRules)} (fail)`,
  ),
  rowOrder: valued('Reading the table', 'LABELS', anyText, 'the rows in this order (as they appear)'),
  columnOrder: valued('Reading the table', 'LABELS', anyText, 'the columns in this order (as they appear)'),
  merge: repeatable(
    'Reading the table',
    'NEW=A+B',
    anyText,
    'levels A and B become one, before anything else; rows: or columns: in front says which; may be repeated',
  ),
  keep: repeatable(
    'Reading the table',
    'LABELS',
    anyText,
    'only these levels of a side, separated by commas; likewise',
  ),
  drop: repeatable('Reading the table', 'LABELS', anyText, 'all but these levels of a side; likewise'),
  headerRow: valued(
    'Reading the table',
    'ANSWER',
    oneOf(answers),
    `does the first line hold labels? ${either(answers)} (detect)`,
  ),
  labelColumn: valued(
    'Reading the table',
    'ANSWER',
    oneOf(answers),
    `does the first column hold labels? ${either(answers)} (detect)`,
  ),
  delimiter: valued('Reading the table', 'NAME', oneOf(delimiters), `${either(delimiters)} (detected)`),
  dropTotals: toggle('Reading the table', 'leave out a row or column of totals'),
  keepTotals: toggle('Reading the table', 'count what looks like totals as data'),
};
