// How keepsum reads CSV, for cross-tables and raw records alike: the parser's options, and its errors as problems.
import type { CsvError, Options } from 'csv-parse';
import type { Problem } from '../problem/problem.js';
import { dataProblem } from '../problem/problem.js';
import type { InputNote } from './read-table.js';

/** In bytes. No record of counts is that long; a quote that is never closed is found here, before it fills the memory. */
export const longestRecord = 1_000_000;

/**
 * Comments are lines whose first character is # (blanks before it aside); line ends may differ from line to line;
 * blanks around unquoted fields go; records may differ in length, because our own message for that says more.
 */
export const csvOptions = (delimiter: string): Options => ({
  delimiter,
  comment: '#',
  comment_no_infix: true,
  record_delimiter: ['\r\n', '\n', '\r'],
  skip_empty_lines: true,
  relax_column_count: true,
  trim: true,
  max_record_size: longestRecord,
});

/** Which field an error of the parser is about: indexes from 0. */
export const fieldOfError = (error: CsvError): { record: number; field: number } => ({
  record: Number(error['records'] ?? 0),
  field: Number(error['index'] ?? 0),
});

const quoteAdvice = 'put the whole field in double quotes and write a quote inside it twice: "5"" pipe"';

/** The parser's error in our words. */
export function csvProblem(error: CsvError, place: string): Problem {
  switch (error.code) {
    case 'CSV_QUOTE_NOT_CLOSED':
      return dataProblem({
        code: 'open-quote',
        message: 'the quoted field that begins here is never closed',
        place,
        hint: 'close it with a double quote',
      });
    case 'CSV_MAX_RECORD_SIZE':
      return dataProblem({
        code: 'long-record',
        message: `this record runs over ${longestRecord} bytes`,
        place,
        hint: 'look for a double quote that is never closed, or for a file that is not a table',
      });
    default:
      return dataProblem({
        code: 'stray-quote',
        message: 'a double quote stands in the middle of this field',
        place,
        hint: quoteAdvice,
      });
  }
}

/** Said when comment lines stand among the data: a label that begins with # is easily lost that way. */
export const commentsNote = (lines: number): InputNote => ({
  code: 'comment-lines',
  text:
    `${lines === 1 ? 'one line that begins' : `${lines} lines that begin`} with # below the first line of data ` +
    `${lines === 1 ? 'was' : 'were'} skipped as comments (a value that begins with # goes in double quotes)`,
});
