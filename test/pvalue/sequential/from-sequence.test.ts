// The p-value made of a sequence: its fields, and that a result may carry it.
import Ajv2020 from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import type { SampledCut } from '../../../src/null/contract.js';
import { sequentialDoubled, sequentialPValue } from '../../../src/pvalue/sequential/from-sequence.js';
import { startDoubledSequence, startSequence } from '../../../src/pvalue/sequential/stopping-rule.js';
import { resultDeclaration } from '../../../src/result/declaration.js';
import { errorSentences } from '../../../src/result/error-sentences.js';
import { resultJsonSchema } from '../../../src/result/schema.js';
import { pearsonSampled } from '../../helpers/sample-results.js';

const options = { alpha: 0.05, risk: 0.0005, targetRelativeError: 0.02, limit: 1_000_000, blockSize: 1000 };
const validate = new Ajv2020.default({ strict: true, allowUnionTypes: true, allErrors: true }).compile(
  resultJsonSchema(),
);

const cut = (ordering: 'upper' | 'lower', tied: number, above: number): SampledCut => ({
  kind: 'sampled',
  ordering,
  ...{ below: 1000 - tied - above, tied, above, draws: 1000 },
});

describe('a p-value drawn until it was settled', () => {
  const sequence = startSequence(options);
  const decision = sequence.add(12, 1000);
  const state = sequence.state();
  const p = sequentialPValue(
    { tail: 'upper', rule: null, statistic: 'pearson' },
    cut('upper', 4, 8),
    state,
    'settled-below',
  );

  it('carries the p of the sequence, its interval, its risk and why drawing stopped', () => {
    expect(decision).toEqual({ stop: true, because: 'settled-below' });
    expect(p).toEqual({
      tail: 'upper',
      orderedBy: 'pearson',
      method: 'sample',
      statistic: 'pearson',
      p: state.upper + 0.0005,
      log10P: Math.log10(state.upper + 0.0005),
      strict: 0.008,
      mid: 0.01,
      tied: 0.004,
      guaranteed: true,
      errors: [
        {
          kind: 'sequential',
          rule: 'beta-binomial-mixture',
          level: 0.9995,
          risk: 0.0005,
          stoppedBecause: 'settled-below',
          atLeast: 12,
          draws: 1000,
          estimate: 0.012,
          interval: [state.lower, state.upper],
          drawsToSettle: 0,
        },
      ],
    });
  });

  it('may stand in a result, by the declaration and by the published schema', () => {
    const result = { ...pearsonSampled, pValues: [p, ...pearsonSampled.pValues] };
    expect(resultDeclaration.parse(result)).toEqual(result);
    expect(validate(JSON.parse(JSON.stringify(result))), JSON.stringify(validate.errors)).toBe(true);
  });

  it('says in a sentence what its p is made of', () => {
    const [sentence] = errorSentences(resultDeclaration.parse({ ...pearsonSampled, pValues: [p] }).pValues[0]!);
    expect(sentence).toContain('12 of 1,000 random tables were at least as extreme');
    expect(sentence).toContain('plus 0.0005');
  });
});

describe('a doubled p-value drawn until it was settled', () => {
  it('doubles the shares of the smaller tail and names the counts of both', () => {
    const sequence = startDoubledSequence(options);
    const decision = sequence.add({ upper: 999, lower: 3 }, 1000);
    expect(decision).toEqual({ stop: true, because: 'settled-below' });
    const state = sequence.state();
    const question = { tail: 'both', rule: 'doubled', statistic: 'score' } as const;
    const p = sequentialDoubled(question, cut('upper', 2, 997), cut('lower', 2, 1), state, 'settled-below');
    expect(p).toMatchObject({ rule: 'doubled', p: state.p, strict: 0.002, mid: 0.004, tied: 0.004 });
    expect(p.errors[0]).toMatchObject({ atLeast: 3, estimate: 0.006, tails: { upper: 999, lower: 3 } });
    const result = { ...pearsonSampled, pValues: [p] };
    expect(resultDeclaration.parse(result)).toEqual(result);
  });
});
