// The value of an option that lists labels (`--row-labels`, `--column-order` and their like): one CSV record,
// so that a label may hold a comma when it stands in double quotes.
import { parse } from 'csv-parse/sync';
import { usageProblem } from '../problem/problem.js';
import { shownValue } from './shown-value.js';

/**
 * @param option the option's name as typed, for the message
 * @returns the labels, blanks around them taken off; none is empty and no two are equal
 * @throws Problem (usage): `label-list`, `empty-label`, `duplicate-label`
 */
export function parseLabelList(text: string, option: string): string[] {
  const labels = onlyRecord(text, option).map((label) => label.trim());
  const seen = new Set<string>();
  labels.forEach((label, index) => {
    if (label === '') {
      throw usageProblem({
        code: 'empty-label',
        message: `label ${index + 1} of ${labels.length} is empty`,
        place: option,
        hint: 'give every label some text; labels are separated by single commas',
      });
    }
    if (seen.has(label)) {
      throw usageProblem({
        code: 'duplicate-label',
        message: `the label ${shownValue(label)} is listed twice`,
        place: option,
        hint: 'list each label once',
      });
    }
    seen.add(label);
  });
  return labels;
}

function onlyRecord(text: string, option: string): string[] {
  let records: string[][] = [];
  try {
    records = parse(text, { trim: true, relax_column_count: true });
  } catch {
    // Falls through to the problem below: a quote that is not closed, or one in the middle of a label.
  }
  if (records.length === 1) return records[0]!;
  throw usageProblem({
    code: 'label-list',
    message: `${shownValue(text)} is not a list of labels`,
    place: option,
    hint: `separate labels by commas, and put a label that holds a comma in double quotes: ${option} '"lost, moved",healed'`,
  });
}
