import { describe, expect, it } from 'vitest';
import { sentenceFor } from '../../src/result/sentence.js';
import * as samples from '../helpers/sample-results.js';

describe('the sentence for a report', () => {
  it('puts the shares of both groups, their difference, tail and rule beside an exact p', () => {
    expect(samples.waldExact.sentence).toBe(
      'With the rows as groups, 8 of 10 (80%) in "treated" against 1 of 10 (10%) in "control" were "healed" ' +
        '(first minus second: 70 percentage points); the Wald statistic is 4.427 and its two-tailed permutation p ' +
        '(rule: distance) is 0.00548, exact.',
    );
  });

  it('names draws, seed and error of a sampled p, and shows p no further than that error', () => {
    expect(samples.pearsonSampled.sentence).toBe(
      "In a 3 x 4 table of 55 counts, Pearson's chi-square statistic is 14.16 (6 degrees of freedom) and its upper-tailed " +
        'permutation p is 0.026 (standard error 0.0049, 99% interval 0.0141 to 0.0407), sampled from 1,000 random tables ' +
        'with the same margins (seed "spring-7").',
    );
  });

  it('says columns when they are the groups, and doubled when that is the rule', () => {
    expect(samples.doubledSampled.sentence).toContain('With the columns as groups, 11 of 14 (78.6%) in "new die"');
    expect(samples.doubledSampled.sentence).toContain('two-tailed permutation p (rule: doubled) is 0.082');
  });

  it('shows a p below the smallest double by its power of ten', () => {
    expect(samples.underflow.sentence).toContain('upper-tailed permutation p is about 10^-545.3, exact.');
  });

  it('gives no standard error where no draw was as extreme, but the interval', () => {
    expect(samples.noneAsExtreme.sentence).toContain('p is 1e-5 (99% interval 0 to 5.3e-5), sampled from 100,000');
    expect(samples.noneAsExtreme.sentence).not.toContain('standard error');
  });

  it('says that one table only speaks neither for nor against an association', () => {
    expect(samples.onlyOneTable.sentence).toBe(
      'The margins of this 3 x 2 table of 10 counts allow no other table, so the upper-tailed permutation p of ' +
        "Pearson's chi-square statistic is 1 whatever the counts: it speaks neither for nor against an association.",
    );
  });

  it('says of an approximate p which approximation it is and that its error is unknown', () => {
    expect(samples.asymptoticHeadline.sentence).toContain(
      'its upper-tailed p is 0.0149 (error unknown) by the chi-square approximation.',
    );
  });

  it('counts degrees of freedom only for a statistic that has a chi-square law', () => {
    const statistic = { ...samples.probabilityExact.statistic, degreesOfFreedom: 24 };
    expect(sentenceFor({ ...samples.probabilityExact, statistic })).not.toContain('degrees of freedom');
    expect(samples.emptyRow.sentence).toContain('(4 degrees of freedom)');
  });

  it('names the group a one-tailed p looks to', () => {
    const { waldExact } = samples;
    const upper = { ...waldExact, pValues: waldExact.pValues.slice(1) };
    expect(sentenceFor(upper)).toContain(
      'its upper-tailed permutation p ("healed" more common in "treated") is 0.00274',
    );
  });

  it('says that an empty group leaves no statistic and no difference', () => {
    const { waldExact } = samples;
    const groups: NonNullable<typeof waldExact.statistic.groups> = [
      { label: 'treated', events: 0, size: 0, proportion: null },
      waldExact.statistic.groups![1],
    ];
    const empty = {
      ...waldExact,
      statistic: { ...waldExact.statistic, value: null, reason: 'empty-group' as const, groups },
    };
    expect(sentenceFor(empty)).toContain('0 of 0 in "treated"');
    expect(sentenceFor(empty)).toContain('(an empty group leaves no difference); the Wald statistic is undefined');
  });

  it.each(Object.entries(samples.sampleResults))('%s: is one line, without a verdict or stars', (_, result) => {
    expect(result.sentence).not.toMatch(/\n|significan|\*|reject/);
    expect(result.sentence).toMatch(/\.$/);
  });
});
