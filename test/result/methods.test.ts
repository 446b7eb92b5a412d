import { describe, expect, it } from 'vitest';
import * as samples from '../helpers/sample-results.js';

describe('the methods paragraph', () => {
  it('cites what an exact two-group test used, and nothing it did not use', () => {
    const { methods } = samples.waldExact;
    expect(methods).toContain('unpooled form, after Wald 1943');
    expect(methods).toContain('differences are "treated" minus "control"');
    for (const source of ['Fisher 1935', 'Lancaster 1961', 'Cochran (1954)']) expect(methods).toContain(source);
    for (const source of ['Patefield', 'Phipson', 'Clopper', 'Freeman']) expect(methods).not.toContain(source);
  });

  it('cites what a sampled test used, with draws, seed and generator', () => {
    const { methods } = samples.pearsonSampled;
    expect(methods).toContain('m = 1,000 random tables with both margins held');
    expect(methods).toContain('generator tyche-i, seed "spring-7"');
    for (const source of ['Patefield 1981', 'Phipson & Smyth 2010', 'Clopper & Pearson 1934'])
      expect(methods).toContain(source);
    expect(methods).not.toContain('Fisher');
  });

  it('cites Freeman & Halton for an exact table larger than 2 x 2', () => {
    expect(samples.emptyRow.methods).toContain('(Freeman & Halton 1951)');
    expect(samples.emptyRow.methods).not.toContain('Fisher');
  });

  it('gives the formula of a doubled sampled p', () => {
    expect(samples.doubledSampled.methods).toContain(
      'reported as 2 (b + 1) / (m + 1), at most 1 (Phipson & Smyth 2010)',
    );
  });

  it('says of an approximation asked for whether its footing holds', () => {
    expect(samples.asymptoticHeadline.methods).toContain('Wilks 1935');
    expect(samples.asymptoticHeadline.methods).toContain('the advice on expected counts of Cochran (1954) was met');
  });

  it.each(Object.entries(samples.sampleResults))(
    '%s: ends by naming the software and its version',
    (_, { methods }) => {
      expect(methods).toMatch(/Computed with keepsum 0\.1\.0\.$/);
      expect(methods).not.toMatch(/\n|undefined|null|NaN/);
    },
  );
});
