import Ajv2020 from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { resultDeclaration } from '../../src/result/declaration.js';
import { resultJsonSchema } from '../../src/result/schema.js';
import { sampleResults, waldExact } from '../helpers/sample-results.js';

const validate = new Ajv2020.default({ strict: true, allowUnionTypes: true, allErrors: true }).compile(
  resultJsonSchema(),
);

describe('the published schema', () => {
  it('is JSON Schema 2020-12 with a name of its own', () => {
    expect(resultJsonSchema()).toMatchObject({
      $schema: 'https://json-schema.org/draft/2020-12/schema',
      $id: 'keepsum/result/1',
      title: 'keepsum result',
      additionalProperties: false,
    });
  });

  it.each(Object.entries(sampleResults))(
    '%s: satisfies the declaration and the schema derived from it',
    (_, result) => {
      expect(resultDeclaration.parse(result)).toEqual(result);
      expect(validate(JSON.parse(JSON.stringify(result))), JSON.stringify(validate.errors)).toBe(true);
    },
  );

  it.each<[string, object]>([
    ['a field left out', { ...waldExact, sentence: undefined }],
    ['a field that is not declared', { ...waldExact, verdict: 'significant' }],
    ['a probability above 1', { ...waldExact, pValues: [{ ...waldExact.pValues[0], p: 1.5 }] }],
    ['no p-value at all', { ...waldExact, pValues: [] }],
    ['an unknown kind of error', { ...waldExact, pValues: [{ ...waldExact.pValues[0], errors: [{ kind: 'luck' }] }] }],
    ['a fractional count', { ...waldExact, input: { ...waldExact.input, total: 20.5 } }],
    ['another schema version', { ...waldExact, schema: 'keepsum/result/2' }],
    [
      'three groups',
      {
        ...waldExact,
        statistic: { ...waldExact.statistic, groups: [1, 2, 3].map(() => waldExact.statistic.groups![0]) },
      },
    ],
  ])('refuses a result with %s', (_, broken) => {
    expect(validate(JSON.parse(JSON.stringify(broken)))).toBe(false);
    expect(resultDeclaration.safeParse(JSON.parse(JSON.stringify(broken))).success).toBe(false);
  });
});
