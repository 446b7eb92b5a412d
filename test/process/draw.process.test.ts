// keepsum draw: random tables that keep the margins, repeatable, for pipelines.
import { describe, expect, it } from 'vitest';
import { inShell, keepsum } from './run-command.js';

interface Line {
  key: string;
  counts: number[][];
  rowLabels?: string[];
}

const linesOf = (out: string): Line[] =>
  out
    .trimEnd()
    .split('\n')
    .map((line) => JSON.parse(line) as Line);
const sums = (counts: number[][]): number[][] => [
  counts.map((row) => row.reduce((a, b) => a + b)),
  counts[0]!.map((_, j) => counts.reduce((sum, row) => sum + row[j]!, 0)),
];

describe('keepsum draw', () => {
  it('gives tables with the margins asked for, one JSON object a line, the same for the same seed', async () => {
    const words = ['draw', '8,2,0', '1,9,0', '3,3,0', '--number', '2500', '--seed', 'a'];
    const first = await keepsum(words);
    expect([first.status, first.err]).toEqual([0, '']);
    const lines = linesOf(first.out);
    expect(lines).toHaveLength(2500);
    lines.forEach(({ key, counts }, k) => {
      expect(key).toBe(String(k + 1));
      expect(sums(counts)).toEqual([
        [10, 10, 6],
        [12, 14, 0],
      ]);
    });
    expect((await keepsum(words)).out).toBe(first.out);
    expect(new Set(lines.map(({ counts }) => counts.join())).size).toBeGreaterThan(20);
  });

  it('is the sample that a test with the same seed judges', async () => {
    const drawn = linesOf((await keepsum(['draw', '8,2', '1,9', '--number', '3000', '--seed', 'b'])).out);
    const tested = await keepsum([
      'test',
      '8,2',
      '1,9',
      '--method',
      'sample',
      '--draws',
      '3000',
      '--seed',
      'b',
      '--format',
      'json',
    ]);
    const atLeast = drawn.filter(({ counts }) => Math.abs(counts[0]![0]! - 4.5) >= 3.5).length;
    expect(JSON.parse(tested.out).pValues[0].errors[0].atLeast).toBe(atLeast);
  });

  it('carries the labels of a file, says the seed it made, and ends quietly when nobody reads on', async () => {
    const labelled = await keepsum(['draw', 'fixtures/demo/orchid-forms.tsv']);
    expect(linesOf(labelled.out)[0]!.rowLabels).toEqual(['white', 'pale pink', 'deep pink', 'speckled']);
    expect(labelled.err).toMatch(/^note: the seed is [2-9a-z]{8}\n$/);
    const cut = await inShell('keepsum draw 8,2 1,9 --number 1e9 --seed c | head -n 1; echo "${PIPESTATUS[0]}"');
    expect(cut.out).toMatch(/^\{"key":"1".*\}\n0\n$/);
    expect(cut.err).toBe('');
  });

  it.each([
    [['draw'], 2],
    [['draw', '8,2', '1,x'], 1],
    [['draw', '8,2', '1,9', '--number', '0'], 2],
  ])('refuses %j with status %d', async (words, status) => {
    const { out, err, status: ended } = await keepsum(words, { input: '' });
    expect([out, ended]).toEqual(['', words.length === 1 ? 1 : status]);
    expect(err).toMatch(/^error: .+\nhint: .+\n$/);
  });
});
