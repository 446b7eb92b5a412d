// Hints on what a table might really be, and their silence on ordinary ones.
import { describe, expect, it } from 'vitest';
import { analyse } from '../../src/analyse.js';
import { looksOrdered } from '../../src/result/ordered-labels.js';
import { checked } from '../helpers/checked-result.js';

const codes = async (counts: number[][], rowLabels?: string[], columnLabels?: string[], statistic = 'pearson'): Promise<string[]> => {
  const labels = { ...(rowLabels === undefined ? {} : { rowLabels }), ...(columnLabels === undefined ? {} : { columnLabels }) };
  const { notes } = checked(await analyse({ counts, ...labels }, { statistic, method: 'asymptotic' }));
  return notes.map(({ code }) => code);
}; // prettier-ignore

describe('hints', () => {
  it('say nothing of ordinary tables with default labels', async () => {
    for (const counts of [[[8, 2], [1, 9]], [[10, 10], [10, 10]].map((r) => r.map((n) => n + 1)), [[3, 4, 5], [6, 1, 2], [7, 3, 9]]]) {
      expect(await codes(counts)).not.toEqual(expect.arrayContaining([expect.stringMatching(/same-labels|ordered|weighted/)]));
    }
  }); // prettier-ignore

  it('ask whether the units are pairs when both sides have the same labels, in any order', async () => {
    expect(await codes([[8, 2], [1, 9]], ['ill', 'well'], ['Well', 'ill'])).toContain('same-labels-on-both-sides'); // prettier-ignore
    expect(await codes([[8, 2], [1, 9]], ['ill', 'well'], ['yes', 'no'])).not.toContain('same-labels-on-both-sides'); // prettier-ignore
  });

  it('point to order only where trend could use it, and not where it is used', async () => {
    const counts = [[8, 2, 4], [1, 9, 7]]; // prettier-ignore
    const levels = ['mild', 'moderate', 'severe'];
    expect(await codes(counts, undefined, levels)).toContain('labels-look-ordered');
    expect(await codes(counts, undefined, levels, 'trend')).not.toContain('labels-look-ordered');
    expect(await codes([...counts, [3, 3, 5]], undefined, levels)).not.toContain('labels-look-ordered');
  });

  it('notice a common factor that chance hardly gives, and large equal counts', async () => {
    expect(await codes([[40, 20], [30, 70]])).toContain('counts-look-weighted'); // prettier-ignore
    expect(await codes([[15, 20], [30, 25]])).not.toContain('counts-look-weighted'); // prettier-ignore
    expect(await codes([[97, 97, 97], [97, 12, 31]])).toContain('counts-look-weighted'); // prettier-ignore
  });

  it.each([
    [['0', '1', '10'], true],
    [['20-29', '30-39', '40+'], true],
    [['<5', '5-9', '10'], true],
    [['10 mg', '5 mg', '0 mg'], true],
    [['Stage I', 'stage II', 'stage IV'], true],
    [['never', 'sometimes', 'often'], true],
    [['low', 'high'], false],
    [['high', 'low', 'medium'], false],
    [['ward 1', 'ward 2', 'ward 3'], false],
    [['row 1', 'row 2', 'row 3'], false],
    [['north', 'south', 'east'], false],
  ])('order in %j: %s', (labels, ordered) => {
    expect(looksOrdered(labels)).toBe(ordered);
  });
});
