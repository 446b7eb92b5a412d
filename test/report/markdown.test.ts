import { describe, expect, it } from 'vitest';
import { render } from '../../src/report/formats.js';
import * as samples from '../helpers/sample-results.js';
import type { Result } from '../../src/result/result.js';

const withRow = (label: string): Result => ({
  ...samples.waldExact,
  input: { ...samples.waldExact.input, rowLabels: [label, 'control'] },
});

describe('the markdown report', () => {
  it('holds the table with its margins as a pipe table', () => {
    expect(render(samples.waldExact, 'markdown')).toContain(
      [
        '|  | healed | open | **all** |',
        '| :-- | --: | --: | --: |',
        '| treated | 8 | 2 | **10** |',
        '| control | 1 | 9 | **10** |',
        '| **all** | **9** | **11** | **20** |',
      ].join('\n'),
    );
  });

  it('has the headings of the text report, and the paragraph for a methods section', () => {
    const headings = render(samples.waldExact, 'markdown').match(/^#+ .*$/gm);
    expect(headings?.[0]).toBe('# Is "healed" as common in "treated" as in "control"?');
    expect(headings).toContain('## The answer');
    expect(headings?.at(-1)).toBe('## For a methods section');
    expect(render(samples.waldExact, 'markdown')).toContain('tested with the Wald statistic');
  });

  it.each([
    ['a|b', 'a\\|b'],
    ['*a* _b_ `c` ~d~', '\\*a\\* \\_b\\_ \\`c\\` \\~d\\~'],
    ['[x](http://x.example)', '\\[x\\](http\\://x.example)'],
    ['www.x.example', 'www\\.x.example'],
    ['<script>', '&lt;script&gt;'],
    ['&lt;b&gt;', '&amp;lt;b&amp;gt;'],
    ['&#60;', '&amp;\\#60;'],
    ['Fish & chips', 'Fish & chips'],
    ['- item', '\\- item'],
    ['1. item', '1\\. item'],
    ['back\\slash', 'back\\\\slash'],
    ['$x$', '\\$x\\$'],
    ['', '(blank)'],
    ['a\u001b[1m', 'a\\\\x1b\\[1m'],
  ])('escapes the label %j', (label, wanted) => {
    expect(render(withRow(label), 'markdown')).toContain(`\n| ${wanted} | 8 | 2 |`);
  });

  it('sets remarks on this table apart as quotations', () => {
    expect(render(samples.emptyRow, 'markdown')).toContain(
      '\n> Left out because no unit falls into it (p is the same either way): row "not given".\n',
    );
  });

  it('sets the command as code', () => {
    expect(render(samples.waldExact, 'markdown')).toContain(
      '\n\n    keepsum test treated=8,2 control=1,9 --column-labels',
    );
  });
});
