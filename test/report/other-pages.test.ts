// Reports that are not about one table: planned studies, outcomes tested together, adjusted families.
import stringWidth from 'string-width';
import { describe, expect, it } from 'vitest';
import { adjustResults } from '../../src/adjust-results.js';
import { adjustments } from '../../src/family/adjust.js';
import { planPower } from '../../src/plan-power.js';
import { adjustedPage } from '../../src/report/adjusted-page.js';
import { plainPainter } from '../../src/report/format.js';
import { pageText } from '../../src/report/page-lines.js';
import { powerPage } from '../../src/report/power-page.js';
import { togetherPage } from '../../src/report/together-page.js';
import type { Page } from '../../src/report/page.js';
import { adjustMethods, adjustSentence } from '../../src/result/adjust-words.js';
import { citationsOf, mentionsIn, sourceOf } from '../../src/result/citations.js';
import type { TogetherResult } from '../../src/result/together-declaration.js';
import { testTogether } from '../../src/test-together.js';

const together = (): Promise<TogetherResult> =>
  testTogether(
    {
      joint: {
        groups: ['drug', 'placebo'],
        outcomes: [
          { label: 'nausea', levels: ['no', 'yes'] },
          { label: 'rash', levels: ['no', 'yes'] },
        ],
        profiles: [[0, 0], [0, 1], [1, 0], [1, 1]], // prettier-ignore
        counts: [[3, 2, 8, 4], [9, 3, 1, 2]], // prettier-ignore
      },
      sha256: '0f'.repeat(32),
      rule: 'fail',
      records: 32,
      dropped: 0,
      notes: [],
    },
    { seed: 'pages', draws: 2000 },
  );

const results = [0.004, 0.03, 0.2].map((p, k) => ({
  key: `a very long name of a test, number ${k + 1}`,
  family: k < 2 ? 'first' : 'second',
  p,
  leastAttainable: 0.001,
  method: 'exact' as const,
}));
const { lines, remarks } = adjustResults(results, { methods: adjustments, alpha: 0.05 });

const pages: Readonly<Record<string, () => Promise<Page>>> = {
  'a planned study': async () =>
    powerPage(
      await planPower({
        groups: [
          { label: 'treated', probabilities: [0.7] },
          { label: 'control', probabilities: [0.4] },
        ],
        sizes: [20, 30].map((size) => [size, size]),
      }),
    ),
  'outcomes together': async () => togetherPage(await together()),
  'adjusted families': () => Promise.resolve(adjustedPage(lines, adjustments, 0.05, remarks)),
};

describe.each(Object.keys(pages))('%s', (name) => {
  it.each([40, 80, 120])('stays within %i columns', async (width) => {
    const text = pageText(await pages[name]!(), { width, paint: plainPainter, rawCsv: false });
    for (const line of text.split('\n')) expect(stringWidth(line), line).toBeLessThanOrEqual(width);
    expect(text.replace(/\s+/g, ' ')).toMatch(/qualified statistician/);
    expect(text).not.toMatch(/significan|undefined|NaN/);
  });
});

describe('outcomes together, in words', () => {
  it('names the effect with its interval beside p, how p was found, and the seed', async () => {
    const { sentence, methods } = await together();
    expect(sentence).toMatch(
      /^Of 2 outcomes of 32 subjects in 2 groups, "nausea" stands furthest out: tau \(outcome from group\) is 0\.\d+ \(95% interval /,
    );
    expect(sentence).toMatch(
      /adjusted over all by the largest statistic \(99% interval .*2,000 times \(seed "pages"\)/,
    );
    expect(mentionsIn(methods).filter((mention) => sourceOf(mention, false) === undefined)).toEqual([]);
    expect(citationsOf([{ methods }], 'text')).toContain('Westfall');
  });
});

describe('adjusted families, in words', () => {
  it('count by the first procedure asked for, family by family', () => {
    expect(adjustSentence(lines, ['holm'], 0.05)).toBe(
      '2 of 2 tests in family "first" have a p adjusted by holm of at most 0.05; the smallest is 0.00800 ("a very long name of a test, number 1"). ' +
        '0 of 1 tests in family "second" have a p adjusted by holm of at most 0.05; the smallest is 0.200 ("a very long name of a test, number 3").',
    );
  });

  it('cite every procedure by a source that there is', () => {
    const methods = adjustMethods(adjustments, 0.05);
    expect(mentionsIn(methods).filter((mention) => sourceOf(mention, false) === undefined)).toEqual([]);
    for (const name of adjustments) expect(methods).toContain(name);
  });
});
