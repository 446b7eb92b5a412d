// A planned study as a page: what the text says, and its curve. Loaded only by runs that write it.
import { shown } from '../../result/label-words.js';
import type { PowerResult } from '../../result/power-declaration.js';
import { drawPowerCurve, lackOfCurve } from '../pictures/power-curve.js';
import { answerHeading, powerPage } from '../power-page.js';
import { htmlDocument } from './document.js';
import { element, worded } from './element.js';
import { sectionMarkup } from './sections.js';

export function powerHtml(result: PowerResult): string {
  const { title, sections } = powerPage(result);
  const curve = lackOfCurve(result) === undefined ? [element('figure', {}, drawPowerCurve(result, 'power-curve'))] : [];
  const methods = { kind: 'sentence' as const, text: shown(result.methods), tone: 'plain' as const };
  return htmlDocument({
    title,
    main: [
      worded('h1', title),
      ...sections.map((section) =>
        sectionMarkup(section, 'h2', '', undefined, ...(section.heading === answerHeading ? curve : [])),
      ),
      sectionMarkup({ heading: 'For a methods section', blocks: [methods] }, 'h2', ''),
    ],
    version: result.tool.version,
    record: JSON.stringify(result, null, 2),
  });
}
