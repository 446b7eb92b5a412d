// The HTML report: well-formed, without anything that acts or loads, its record whole.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import { escapedText } from '../../../src/report/html/element.js';
import { powerHtml } from '../../../src/report/html/power.js';
import { selfCheckHtml } from '../../../src/report/html/self-check.js';
import { htmlReport } from '../../../src/report/html/report.js';
import { sourcesUsed } from '../../../src/result/citations.js';
import { asText } from '../../../src/result/sources/source.js';
import { pageFor } from '../../../src/report/page.js';
import { planPower } from '../../../src/plan-power.js';
import { selfCheck, shippedCases } from '../../../src/self-check.js';
import { hostileLabels, sampleResults } from '../../helpers/sample-results.js';

/** Tags in order of their opening; every one is closed in its turn. */
function tagsOf(html: string): string[] {
  const open: string[] = [];
  const all: string[] = [];
  const withoutRaw = html
    .replace(/<(style|script)\b([^>]*)>[^]*?<\/\1>/g, '<$1$2></$1>')
    .replace('<!doctype html>', '');
  for (const [, end, name, self] of withoutRaw.matchAll(/<(\/?)([a-zA-Z0-9]+)(?:\s+[\w:-]+="[^"<>]*")*\s*(\/?)>/g)) {
    if (end === '/') expect(open.pop()).toBe(name);
    else {
      all.push(name!);
      if (self !== '/' && name !== 'meta') open.push(name!);
    }
  }
  expect(open).toEqual([]);
  // Nothing that looks like a tag was passed over.
  expect(withoutRaw.split('<').length - 1).toBe(
    [...withoutRaw.matchAll(/<(\/?)([a-zA-Z0-9]+)(?:\s+[\w:-]+="[^"<>]*")*\s*(\/?)>/g)].length,
  );
  return all;
}

const recordOf = (html: string): unknown =>
  JSON.parse(/<script type="application\/json" id="keepsum-record">([^<]*)<\/script>/.exec(html)![1]!);

const orchids = {
  counts: [
    [13, 2, 6],
    [1, 9, 4],
    [5, 2, 12],
  ],
  rowLabels: ['meadow', 'slope', 'wood'],
  columnLabels: ['lilac', 'white', 'yellow'],
};

describe('the html report', () => {
  it('is well-formed for every kind of result, the record in it whole', () => {
    for (const result of Object.values(sampleResults)) {
      const html = htmlReport([result]);
      tagsOf(html);
      expect(recordOf(html)).toEqual(JSON.parse(JSON.stringify(result)));
    }
  });

  it('says what the page says, section by section, headings in order', async () => {
    const result = await analyse(orchids, { nullSummary: true });
    const html = htmlReport([result]);
    const headings = [...html.matchAll(/<h([1-6])>([^<]*)</g)].map(([, level, words]) => [level, words]);
    const { title, sections } = pageFor(result);
    expect(headings).toEqual([
      ['1', title],
      ...sections.map(({ heading }) => ['2', heading]),
      ['2', 'For a methods section'],
      ['2', 'Sources'],
    ]);
    for (const source of sourcesUsed(result)) expect(html).toContain(escapedText(asText(source)));
    const tags = tagsOf(html);
    expect(tags.filter((tag) => tag === 'svg')).toHaveLength(2);
    expect(html).toContain('<html lang="en">');
    expect(html).toContain('<th scope="col">lilac</th>');
    expect(html).toContain('<th scope="row">meadow</th><td class="number more">13</td>');
  });

  it('loads and runs nothing', async () => {
    const html = htmlReport([await analyse(orchids, { nullSummary: true })]);
    expect(html.replaceAll('http://www.w3.org/2000/svg', '')).not.toMatch(/https?:|src=|@import|url\((?!#)| on\w+=/);
    expect(html.match(/<script/g)).toHaveLength(1);
  });

  it('takes labels as text', async () => {
    const label = '</script><script>alert(1)</script>';
    const fromTable = await analyse(
      {
        counts: [
          [8, 2],
          [1, 9],
        ],
        rowLabels: [label, '"><img src=x onerror=alert(1)>'],
        columnLabels: ["&'", '<!--'],
      },
      { nullSummary: true },
    );
    for (const result of [hostileLabels, fromTable]) {
      const html = htmlReport([result]);
      tagsOf(html);
      expect(html.match(/<script/g)).toHaveLength(1);
      expect(html).not.toMatch(/<img|<!--|\u001b|\u202e/);
    }
    expect((recordOf(htmlReport([fromTable])) as typeof fromTable).input.rowLabels[0]).toBe(label);
  });

  it('sets words apart that are written from the right', async () => {
    const rowLabels = ['מחלקה (א) 3', 'ward'];
    const html = htmlReport([
      await analyse({
        counts: [
          [8, 2],
          [1, 9],
        ],
        rowLabels,
      }),
    ]);
    tagsOf(html);
    expect(html).toContain('<th scope="row"><bdi>מחלקה (א)</bdi> 3</th>');
    expect(html).toContain(`&quot;<bdi>מחלקה (א)</bdi> 3&quot;`);
    expect(html).not.toMatch(/<title[^>]*>[^<]*<bdi>|aria-label="[^"]*<bdi/);
  });

  it('of a planned study holds its curve, its plan and its record', async () => {
    const groups = [
      { label: '<a>', probabilities: [0.7] },
      { label: 'b', probabilities: [0.4] },
    ];
    const result = await planPower({
      groups,
      sizes: [
        [20, 20],
        [30, 30],
      ],
    });
    const html = powerHtml(result);
    expect(tagsOf(html).filter((tag) => tag === 'svg')).toHaveLength(1);
    expect(recordOf(html)).toEqual(JSON.parse(JSON.stringify(result)));
    expect(html.match(/<td class="number">0\.\d+<\/td>/g)!.length).toBeGreaterThanOrEqual(4);
    expect(tagsOf(powerHtml(await planPower({ groups, sizes: [[20, 20]] })))).not.toContain('svg');
  });

  it('of a self check holds every case and its record', async () => {
    const cases = (await shippedCases()).slice(0, 3);
    const report = await selfCheck(cases, { runtime: 'r', engine: 'e', system: 's', architecture: 'a' });
    const html = selfCheckHtml(report);
    tagsOf(html);
    expect(recordOf(html)).toEqual(JSON.parse(JSON.stringify(report)));
    for (const { id, answers } of cases) {
      expect(html).toContain(`<h3>${id}: `);
      for (const { what } of answers) expect(html).toContain(`<th scope="row">${escapedText(what)}</th>`);
    }
  });

  it('holds several results, each under a heading of its own, ids apart', async () => {
    const results = [
      await analyse(orchids, { nullSummary: true }),
      await analyse({
        counts: [
          [8, 2],
          [1, 9],
        ],
      }),
    ];
    const html = htmlReport(results);
    tagsOf(html);
    const ids = [...html.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(ids.length);
    expect(html.match(/<h1>/g)).toHaveLength(1);
    expect(html.match(/<article/g)).toHaveLength(2);
    expect(recordOf(html)).toEqual(JSON.parse(JSON.stringify(results)));
  });
});
