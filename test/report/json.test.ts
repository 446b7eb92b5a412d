import { describe, expect, it } from 'vitest';
import { render } from '../../src/report/formats.js';
import { hostileLabels, sampleResults, waldExact } from '../helpers/sample-results.js';

describe('the json report', () => {
  it.each(Object.entries(sampleResults))('%s: is the result, whole, ending in a line feed', (_, result) => {
    const report = render(result, 'json');
    expect(JSON.parse(report)).toEqual(result);
    expect(report).toMatch(/^\{\n {2}"schema": "keepsum\/result\/1",\n/);
    expect(report.endsWith('}\n')).toBe(true);
  });

  it('sends no control or reversing character to a terminal', () => {
    expect(render(hostileLabels, 'json')).not.toMatch(/[^\n\x20-\x7e\u00a0-\u02ff]/);
  });

  it.each([
    ['NaN', { ...waldExact.pValues[0]!, mid: NaN }, 'result.pValues.0.mid is NaN'],
    ['an infinity', { ...waldExact.pValues[0]!, log10P: -Infinity }, 'result.pValues.0.log10P is -Infinity'],
  ])('refuses %s, which JSON would turn into null', (_, p, message) => {
    expect(() => render({ ...waldExact, pValues: [p] }, 'json')).toThrow(message);
  });
});
