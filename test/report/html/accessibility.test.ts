// Every kind of page in a real browser: held against the rules of WCAG 2 by axe-core, light and dark; on a phone and on
// paper nothing sticks out. Where no browser is installed the tests are passed over, and say so.
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { browserProgram, startBrowser, type Browser } from '../../helpers/browser.js';
import { pageKinds, pageOf } from '../../helpers/page-samples.js';

const axe = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
/** A millimetre in pixels, as style sheets have it. */
const millimetre = 96 / 25.4;
const margins = 2 * 18;
const papers = { A4: 210, Letter: 215.9 };

let browser: Browser;

interface Violation {
  readonly rule: string;
  readonly places: readonly string[];
}

const violations = async (): Promise<Violation[]> => {
  await browser.ask(`${axe};0`);
  return browser.ask(
    `axe.run(document, { resultTypes: ['violations'] }).then(({ violations }) =>
       violations.map(({ id, nodes }) => ({ rule: id, places: nodes.map(({ html }) => html) })))`,
  );
};

/** By how much the page is wider than what it is seen in, and what it fetched. */
const overflow = (): Promise<number> =>
  browser.ask('document.documentElement.scrollWidth - document.documentElement.clientWidth');

/** The least contrast of the words of pictures with what lies under them (WCAG 2), which axe-core leaves open. */
const pictureContrast = (): Promise<number> =>
  browser.ask(`(() => {
    const part = (c) => (c /= 255) <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
    const light = (e) => { const [r, g, b] = getComputedStyle(e).fill.match(/\\d+/g).map(Number); return 0.2126 * part(r) + 0.7152 * part(g) + 0.0722 * part(b); };
    const ratio = (a, b) => (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
    const under = (word) => {
      const { left, top, width, height } = word.getBoundingClientRect();
      const [x, y] = [left + width / 2, top + height / 2];
      const boxes = [...word.ownerSVGElement.querySelectorAll('rect')].filter((box) => {
        const r = box.getBoundingClientRect();
        return r.left <= x && x <= r.right && r.top <= y && y <= r.bottom && !getComputedStyle(box).fill.startsWith('url') && !box.closest('defs');
      });
      return boxes.at(-1);
    };
    return Math.min(21, ...[...document.querySelectorAll('svg text')].map((word) => ratio(light(word), light(under(word)))));
  })()`);

const has = browserProgram !== undefined;
describe.skipIf(!has)(has ? 'in a browser' : 'in a browser (passed over: none is installed here)', () => {
  beforeAll(async () => {
    browser = await startBrowser(browserProgram!);
  });
  afterAll(() => browser.close());

  it.each(pageKinds)('%s breaks no rule of accessibility, light or dark, and sticks out nowhere', async (kind) => {
    const html = await pageOf(kind);
    for (const scheme of ['light', 'dark'] as const) {
      await browser.show(html, { width: 1000, scheme });
      expect(await violations(), scheme).toEqual([]);
      expect(await pictureContrast(), scheme).toBeGreaterThan(4.5);
    }
    await browser.show(html, { width: 360 });
    expect(await overflow(), 'phone').toBe(0);
    for (const [name, width] of Object.entries(papers)) {
      await browser.show(html, { width: Math.floor((width - margins) * millimetre), media: 'print' });
      expect(await overflow(), name).toBe(0);
    }
    expect(await browser.ask(`performance.getEntriesByType('resource').length`)).toBe(0);
  });

  it('a page without names for its parts is found out', async () => {
    const html = (await pageOf('a self check')).replace(' lang="en"', '').replace('--ink: #222', '--ink: #aaa');
    await browser.show(html, { width: 1000 });
    expect((await violations()).map(({ rule }) => rule).sort()).toEqual(['color-contrast', 'html-has-lang']);
  });
});
