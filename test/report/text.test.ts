import { describe, expect, it } from 'vitest';
import { render } from '../../src/report/formats.js';
import * as samples from '../helpers/sample-results.js';

const headingsOf = (report: string): string[] => report.split('\n').filter((line) => /^\S/.test(line));
/** The report as running text, folded lines joined. */
const running = (report: string): string => report.replace(/\s+/g, ' ');

describe('the text report', () => {
  it('reads from the question to how to run it again', () => {
    expect(headingsOf(render(samples.waldExact, 'text'))).toEqual([
      'Is "healed" as common in "treated" as in "control"?',
      'What was tested',
      'The table',
      'The answer',
      'What another choice would change',
      'Before you use it',
      'To run it again',
    ]);
  });

  it('has nothing to say of other choices or approximations where only one table is possible', () => {
    const report = render(samples.onlyOneTable, 'text');
    expect(headingsOf(report)).not.toContain('What another choice would change');
    expect(report).not.toContain('smallest expected count');
  });

  it('asks the one-tailed question when one tail was asked for', () => {
    const { waldExact } = samples;
    const [, upper, lower] = waldExact.pValues;
    const titleWith = (p: typeof upper): string => headingsOf(render({ ...waldExact, pValues: [p!] }, 'text'))[0]!;
    expect(titleWith(upper)).toBe('Is "healed" more common in "treated" than in "control"?');
    expect(titleWith(lower)).toBe('Is "healed" more common in "control" than in "treated"?');
  });

  it('gives the answer as the sentence of the result, and its error as a second', () => {
    const report = running(render(samples.pearsonSampled, 'text'));
    expect(report).toContain(
      `The answer ${samples.pearsonSampled.sentence} Its error is that of drawing: 25 of 1,000 random tables were at least ` +
        'as extreme; with the observed one counted in, p is 26 / 1,001 (Phipson & Smyth 2010).',
    );
  });

  it.each([
    ['waldExact', 'Its only error is rounding, at most 2.2e-14 of its value.'],
    ['onlyOneTable', 'It carries no error at all.'],
    ['asymptoticHeadline', 'It rests on an approximation for large counts; its error here is not known.'],
    [
      'noneAsExtreme',
      'none of 100,000 random tables was at least as extreme; with the observed one counted in, p is 1 / 100,001',
    ],
    ['doubledSampled', '203 of 5,000 random tables were at least as extreme in the upper tail, 4,973 in the lower;'],
    ['doubledSampled', 'p is 2 x 204 / 5,001, at most 1'],
  ])('%s: says %s', (name, words) => {
    expect(running(render(samples.sampleResults[name]!, 'text'))).toContain(words);
  });

  it('gives p under every other choice as the end of one sentence, sampled ones with their error, approximate ones as such', () => {
    const exact = render(samples.waldExact, 'text');
    expect(exact).toContain(
      [
        'What another choice would change',
        '  p would be',
        '      0.00280  two-tailed (rule: distance), with ties counted by half (mid-p,',
        '               Lancaster 1961), not guaranteed',
        '     0.000119  two-tailed (rule: distance), with ties left out, not guaranteed',
        '      0.00274  upper-tailed ("healed" more common in "treated"), exact',
        '  above 0.999  lower-tailed ("healed" more common in "control"), exact',
        '       9.5e-6  two-tailed (rule: distance), by the normal approximation, error',
        '               unknown',
      ].join('\n'),
    );
    expect(running(render(samples.emptyRow, 'text'))).toContain(
      '0.0186 upper-tailed, by the chi-square approximation on 4 degrees of freedom, error unknown',
    );
    expect(running(render(samples.doubledSampled, 'text'))).toContain(
      '0.041 upper-tailed ("passed" more common in "new die"), from the same draws (standard error 0.0028, 99% interval 0.0338 to 0.0483)',
    );
  });

  it('says that a choice made after the fact is none, wherever it shows what choices change', () => {
    for (const result of Object.values(samples.sampleResults)) {
      const report = running(render(result, 'text'));
      expect(report.includes('p would be')).toBe(report.includes('Such choices belong before the counts are seen'));
    }
  });

  it('counts missing records and says what became of them', () => {
    const { pearsonSampled } = samples;
    const missing = pearsonSampled.input.missing!;
    const said = (parts: Partial<typeof missing>): string =>
      running(
        render({ ...pearsonSampled, input: { ...pearsonSampled.input, missing: { ...missing, ...parts } } }, 'text'),
      );
    expect(said({})).toContain(
      '61 records were read. Missing: the row value in 2, the column value in 3, both values in 1; these were left out (6 counts).',
    );
    expect(said({ rule: 'level' })).toContain('missing was kept as a level of its own.');
    expect(said({ missingRow: 0, missingColumn: 0, missingBoth: 0 })).toContain(
      '61 records were read, none with a value missing.',
    );
  });

  it('says how a file was read', () => {
    expect(running(render(samples.emptyRow, 'text'))).toContain(
      'A 4 x 3 table of 30 counts, read from a cross-table (commas between fields, a header row, a label column, its total row left out).',
    );
  });

  it('says which method was picked or asked for, and why', () => {
    expect(running(render(samples.probabilityExact, 'text'))).toContain(
      'Method: exact, picked by auto: 2,747,230 tables have these margins; exact work is forecast at 96,153,050 units.',
    );
    expect(running(render(samples.pearsonSampled, 'text'))).toContain('Method: sample, asked for; ');
  });

  it('claims nothing about dealing the counts anew where an approximation was asked for', () => {
    expect(render(samples.asymptoticHeadline, 'text')).not.toContain('Chance deals');
  });

  it('gives every caution, those of this table first and as sentences', () => {
    const report = running(render(samples.emptyRow, 'text'));
    const caution = report.slice(report.indexOf('Before you use it'));
    expect(caution).toMatch(
      /^Before you use it Left out because no unit falls into it \(p is the same either way\): row "not given"\. The smallest expected count is 3\.00;/,
    );
    for (const words of [
      'Association is not causation',
      'neither the size of an effect',
      'independent of each other',
      'qualified statistician',
    ]) {
      expect(caution).toContain(words);
    }
  });

  it('makes a sentence of a note that is a clause', () => {
    const notes = [{ code: 'totals-left-out', text: 'left out as totals: row "sum"' }];
    expect(render({ ...samples.waldExact, notes }, 'text')).toContain('  Left out as totals: row "sum".\n');
  });

  it('paints nothing that words do not say: unpainted, the report is the same', () => {
    const mark = (text: string): string => `<${text}>`;
    const painted = render(samples.waldExact, 'text', { paint: { bold: mark, warn: mark } });
    expect(painted).toContain('<The answer>');
    expect(painted).toMatch(/< {2}The asymptotic p is smaller than the exact one/);
    expect(painted.replace(/^<(.*)>$/gm, '$1')).toBe(render(samples.waldExact, 'text'));
  });

  it('keeps prose to a line that can be read on a very wide terminal', () => {
    const longest = Math.max(
      ...render(samples.waldExact, 'text', { width: 200 })
        .split('\n')
        .map((line) => line.length),
    );
    expect(longest).toBeLessThanOrEqual(96);
  });

  it('takes a width below 40 as 40', () => {
    expect(render(samples.wideTable, 'text', { width: 5 })).toBe(render(samples.wideTable, 'text', { width: 40 }));
  });
});
