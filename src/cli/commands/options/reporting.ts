// Options that change how a result is shown, and no digit of it.
import { oneOf, wholeNumber } from '../../arguments/check-value.js';
import { repeatable, toggle, valued } from '../../arguments/option.js';
import { reportFormats } from '../../../report/formats.js';
import { outputOption } from '../shared-options.js';
import { pictureNames } from '../../../report/pictures/names.js';
import { resultPlot } from '../../plots/plot-wish.js';
import { either } from './words.js';

export const reporting = {
  format: valued('The report', 'NAME', oneOf(reportFormats), `${either(reportFormats)} (text)`),
  output: outputOption,
  rawCsv: toggle('The report', 'leave text cells of CSV output that a spreadsheet would run as a formula as they are'),
  width: valued(
    'The report',
    'N',
    wholeNumber(40, 1000, '100'),
    'characters in a line of text (as wide as the terminal, else 80)',
  ),
  plot: repeatable(
    'The report',
    '[PICTURE=]FILE',
    resultPlot,
    `a picture into FILE.svg or FILE.png: ${either(pictureNames)} (null: how chance alone spreads the statistic); may be repeated`,
  ),
  histogram: toggle(
    'The report',
    'how chance alone spreads the statistic, drawn in text and markdown, in bins in json',
  ),
  color: toggle('The report', 'coloured text even where it goes to a file or a pipe'),
  noColor: toggle('The report', 'no coloured text'),
  threads: valued(
    'How p is found',
    'N',
    wholeNumber(1, 256, '2'),
    'threads for long sampling; the digits are the same (all)',
  ),
  noProgress: toggle('The report', 'no line on standard error that says how far a long run is'),
  quiet: toggle('The report', 'no remarks on standard error', 'q'),
};
