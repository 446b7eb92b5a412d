// Whatever a methods paragraph cites has an entry in the table of sources, and both forms can be read.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { planPower } from '../../src/plan-power.js';
import { citationsOf, mentionsIn, sourceOf, sourcesUsed } from '../../src/result/citations.js';
import { asBibtex, asText, keyOf, sources } from '../../src/result/sources/source.js';
import { pairedForms, pairedStatistics } from '../../src/statistic/paired.js';
import { statistics } from '../../src/statistic/registry.js';
import { stratifiedStatistics } from '../../src/statistic/stratified.js';
import { checked } from '../helpers/checked-result.js';
import { sampleResults } from '../helpers/sample-results.js';
import type { PlanOptions } from '../../src/plan/plan.js';

const small = [[8, 2], [1, 9]]; // prettier-ignore
const larger = [[5, 3, 1], [2, 4, 3], [0, 2, 4]]; // prettier-ignore
const inStrata = [small, [[4, 3], [2, 7]]]; // prettier-ignore
const withoutSource = (methods: string, paired = false) =>
  mentionsIn(methods).filter((mention) => sourceOf(mention, paired) === undefined);

const asked: readonly [number[][], PlanOptions][] = [
  ...statistics.map(({ name, shape }): [number[][], PlanOptions] => [
    shape === '2x2' ? small : larger,
    { statistic: name },
  ]),
  ...(['distance', 'probability', 'doubled', 'blaker'] as const).map((twoSidedRule): [number[][], PlanOptions] => [
    small,
    { statistic: 'score', twoSidedRule },
  ]),
  [larger, { method: 'asymptotic' }],
  [larger, { method: 'sample', draws: 1000, seed: 'c', bootstrap: 100 }],
  [larger, { method: 'sample', seed: 'c', mostDraws: 1000, cells: true }],
  [larger, { ordered: 'both', cells: true }],
  [larger, { compare: 'rows' }],
  ...(['rows', 'columns', 'total'] as const).map((fixed): [number[][], PlanOptions] => [small, { fixed }]),
  [small, { fixed: 'rows', outcomeOrder: 'conditional-p', nuisanceRisk: 1e-6 }],
  ...pairedStatistics.map(({ name, about }): [number[][], PlanOptions] => [
    about === 'change' && name === 'mcnemar' ? small : larger,
    { paired: true, statistic: name },
  ]),
  [larger, { paired: true, method: 'sample', draws: 1000, seed: 'c' }],
];

describe('every source that a methods paragraph names', () => {
  it.each(asked)('%j with %j has an entry', async (counts, options) => {
    const result = checked(await analyse({ counts }, options));
    expect(mentionsIn(result.methods).length).toBeGreaterThan(0);
    expect(withoutSource(result.methods, options.paired)).toEqual([]);
    expect(sourcesUsed(result).length).toBeGreaterThan(0);
  });

  it.each([
    {},
    { statistic: 'mean-scores' },
    { method: 'sample', draws: 1000, seed: 'c' },
    { method: 'sample', seed: 'c', mostDraws: 1000 },
  ] as const)('over strata, with %j', async (options) => {
    const result = checked(await analyse({ strata: inStrata }, options));
    expect(withoutSource(result.methods)).toEqual([]);
  });

  it('with impossible cells, exactly and by a chain', async () => {
    const counts = larger.map((row, i) => row.map((n, j) => (i === j ? 0 : n + 1)));
    const impossible = larger.map((row, i) => row.map((_, j) => i === j));
    for (const method of ['exact', 'sample'] as const) {
      const { methods } = checked(
        await analyse({ counts, impossible }, { method, ...(method === 'sample' ? { seed: 'c', draws: 1000 } : {}) }),
      );
      expect(mentionsIn(methods).length).toBeGreaterThan(0);
      expect(withoutSource(methods)).toEqual([]);
    }
  });

  it('in every sample result and every plan of a study', async () => {
    for (const { methods } of Object.values(sampleResults)) expect(withoutSource(methods)).toEqual([]);
    const groups = [0.7, 0.4].map((p, g) => ({ label: `g${g}`, probabilities: [p] }));
    for (const test of ['conditional', 'mid', 'unconditional'] as const) {
      const { methods } = await planPower({ groups, sizes: [[12, 12]], test });
      expect(mentionsIn(methods).length).toBeGreaterThan(0);
      expect(withoutSource(methods)).toEqual([]);
    }
  });

  it('and every one that a statistic names as its own', () => {
    for (const { name, source } of [
      ...statistics,
      ...statistics.flatMap(({ forms = [] }) => forms),
      ...pairedStatistics,
      ...pairedForms,
      ...stratifiedStatistics,
    ]) {
      expect(mentionsIn(source).length, name).toBeGreaterThan(0);
      expect(withoutSource(source)).toEqual([]);
    }
  });
});

describe('mentions', () => {
  it('are found in both forms, with several authors, several years, and not in labels', () => {
    expect(mentionsIn('as in Mehta, Patel & Gray (1985) and (Darling & Robbins 1967; Howard et al. 2021).')).toEqual([
      { name: 'Gray', year: '1985' },
      { name: 'Robbins', year: '1967' },
      { name: 'Howard et al.', year: '2021' },
    ]);
    expect(mentionsIn('(Cohen 1960, 1968)').map(({ year }) => year)).toEqual(['1960', '1968']);
    expect(mentionsIn('the row "Ward 1999" of 1951 counts, seed "Pearson 1900"')).toEqual([]);
  });

  it('of an unknown source are told apart', () => {
    expect(withoutSource('(Nobody 1999)')).toEqual([{ name: 'Nobody', year: '1999' }]);
  });

  it('of Newcombe 1998 mean another paper where pairs are compared', () => {
    const mention = { name: 'Newcombe', year: '1998' };
    expect(sourceOf(mention, false)!.title).toContain('independent proportions');
    expect(sourceOf(mention, true)!.title).toContain('paired data');
  });
});

describe('the table of sources', () => {
  it('has whole entries under names of their own', () => {
    expect(new Set(sources.map(keyOf)).size).toBe(sources.length);
    for (const source of sources) {
      expect(
        source.authors.every((author) => /^[\p{L}'-]+( [\p{L}]+)?, ([A-Z]\.[ -]?)+$/u.test(author)),
        asText(source),
      ).toBe(true);
      expect(source.publisher !== undefined || (source.volume !== undefined && source.pages !== undefined)).toBe(true);
      const last = source.cited.replace(/ et al\.$/, '').split(/ & |, /);
      last.forEach((name, k) => expect(source.authors[k]!.startsWith(`${name},`), asText(source)).toBe(true));
    }
  });

  it('gives BibTeX entries whose braces close', () => {
    for (const source of sources) {
      const entry = asBibtex(source);
      expect(entry).toMatch(/^@(article|book)\{[a-z-]+-\d{4}(-pairs)?,\n( {2}\w+ = \{.*\},?\n)+\}$/);
      expect(entry.split('{').length).toBe(entry.split('}').length);
    }
  });
});

it('the document ends with the program, in both forms', async () => {
  const result = await analyse({ counts: small }, { statistic: 'probability' });
  const text = citationsOf([result], 'text');
  expect(text).toContain('Freeman, G. H., Halton, J. H. (1951). Note on an exact treatment');
  expect(text.trimEnd().split('\n').at(-1)).toBe(`keepsum ${result.tool.version} (software).`);
  expect(citationsOf([result], 'bibtex')).toContain(`@misc{keepsum,`);
});
