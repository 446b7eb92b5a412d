// --statistic ./mine.mjs through the real command.
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { keepsum } from './run-command.js';

const folder = mkdtempSync(join(tmpdir(), 'keepsum-own-'));
const write = (name: string, value: string): void =>
  writeFileSync(
    join(folder, name),
    `export default { name: 'largest', sided: 'upper', words: 'the largest count', value: ${value} };\n`,
  );

describe("one's own statistic", () => {
  it('gives an exact p where tables are few: the largest count of 3,0,2 1,4,0 2,2,3', async () => {
    write('mine.mjs', '(counts) => Math.max(...counts)');
    const words = ['test', '3,0,2', '1,4,0', '2,2,3', '--statistic', './mine.mjs', '--format', 'json'];
    const { out, err, status } = await keepsum(words, { folder });
    expect([status, err]).toEqual([0, '']);
    const { plan, pValues, statistic } = JSON.parse(out);
    expect(statistic).toMatchObject({ name: 'largest', value: 4 });
    expect(plan).toMatchObject({ method: 'exact', statisticDigest: expect.stringMatching(/^[0-9a-f]{64}$/) });
    expect(pValues[0].p).toBeGreaterThan(pValues[0].strict);
  });

  it.each([
    ['throws.mjs', '() => { throw new Error("no idea"); }'],
    ['nan.mjs', '() => NaN'],
    ['text.mjs', '() => "7"'],
  ])('%s ends with two lines, never a stack trace', async (name, value) => {
    write(name, value);
    const { out, err, status } = await keepsum(['test', '8,2', '1,9', '--statistic', `./${name}`], { folder });
    expect(out).toBe('');
    expect(status).toBeGreaterThan(0);
    expect(err).toMatch(/^error: .+\nhint: .+\n$/);
  });

  it('that waits for ever says so, instead of ending the process without a word', async () => {
    writeFileSync(join(folder, 'waits.mjs'), 'await new Promise(() => {});\nexport default {};\n');
    const { out, err, status } = await keepsum(['test', '8,2', '1,9', '--statistic', './waits.mjs'], { folder });
    expect([out, status]).toEqual(['', 2]);
    expect(err).toMatch(/^error: --statistic: .+ never comes\nhint: .+\n$/);
  });
});
