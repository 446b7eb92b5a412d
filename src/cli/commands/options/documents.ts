// Options that print something shorter than a report in its place.
import { oneOf } from '../../arguments/check-value.js';
import { toggle, valued } from '../../arguments/option.js';
import { either } from './words.js';

const citationForms = ['text', 'bibtex'] as const;

export const documents = {
  brief: toggle('The report', 'the report in one line: statistic, p with its error, number of counts'),
  citations: valued(
    'The report',
    'FORM',
    oneOf(citationForms),
    `in place of the report, the sources of the methods used: ${either(citationForms)}`,
  ),
};
