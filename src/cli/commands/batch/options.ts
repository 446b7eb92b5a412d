// The options of `keepsum batch`, in the order of its help.
import { anyText, oneOf } from '../../arguments/check-value.js';
import { toggle, valued } from '../../arguments/option.js';
import { planning } from '../options/planning.js';
import { reading } from '../options/reading.js';
import { reporting } from '../options/reporting.js';
import { debugOption, helpOption } from '../shared-options.js';
import { either } from '../options/words.js';

const formats = ['ndjson', 'csv'] as const;

export const readingTables = {
  by: valued(
    'Reading the tables',
    'COLUMNS',
    anyText,
    'one long file of records: the columns whose values tell its tables apart, separated by commas',
  ),
  requireKeys: toggle(
    'Reading the tables',
    'a line without a key cannot be used: its number names nothing where lines are dealt to several processes',
  ),
  rows: reading.rows,
  columns: reading.columns,
  count: reading.count,
  strata: reading.strata,
  cluster: reading.cluster,
  family: valued(
    'Reading the tables',
    'COLUMN',
    anyText,
    'the column that names the family of each table, for keepsum adjust',
  ),
  missing: reading.missing,
  rowOrder: reading.rowOrder,
  columnOrder: reading.columnOrder,
  merge: reading.merge,
  keep: reading.keep,
  drop: reading.drop,
  headerRow: reading.headerRow,
  labelColumn: reading.labelColumn,
  delimiter: reading.delimiter,
  dropTotals: reading.dropTotals,
  keepTotals: reading.keepTotals,
};

export const batchOptions = {
  ...readingTables,
  ...planning,
  format: valued('The results', 'NAME', oneOf(formats), `${either(formats)} (ndjson)`),
  full: toggle('The results', 'whole results, one a line, instead of compact lines'),
  output: valued(
    'The results',
    'FILE',
    anyText,
    'write to FILE, which takes its name when it is whole; until then FILE.partial holds what is finished',
    'o',
  ),
  resume: toggle('The results', 'go on with a run that ended before its --output was whole'),
  allowErrors: toggle(
    'The results',
    'status 0 although some tables could not be used (their lines say why), or there were none',
  ),
  rawCsv: reporting.rawCsv,
  threads: reporting.threads,
  noProgress: reporting.noProgress,
  quiet: reporting.quiet,
  debug: debugOption,
  help: helpOption,
};
