// A statistic of the user's own from a module: what is loaded, digested and refused.
import { createHash } from 'node:crypto';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/analyse.js';
import { isModulePath, withOwnStatistic } from '../../../src/cli/commands/module-path.js';
import type { Problem } from '../../../src/problem/problem.js';
import { checked } from '../../helpers/checked-result.js';

const folder = mkdtempSync(join(tmpdir(), 'keepsum-statistic-'));
const moduleOf = (name: string, text: string): string => {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
};
const codeOf = async (path: string): Promise<string> => {
  try {
    await withOwnStatistic({ statistic: path });
  } catch (thrown) {
    return (thrown as Problem).code;
  }
  throw new Error('was not refused');
};

describe('a module named by --statistic', () => {
  it('is run, and its bytes are digested into the plan', async () => {
    const text = `export default { name: 'corner', sided: 'upper', words: 'the first cell', value: (counts) => counts[0] };\n`;
    const path = moduleOf('corner.mjs', text);
    const options = await withOwnStatistic({ statistic: path });
    const result = checked(await analyse({ counts: [[8, 2], [1, 9]] }, options)); // prettier-ignore
    expect(result.statistic).toMatchObject({ name: 'corner', value: 8 });
    expect(result.plan.statisticDigest).toBe(createHash('sha256').update(text).digest('hex'));
    expect(result.notes.map(({ code }) => code)).toContain('own-statistic');
  });

  it('is told from a name by its ending or a slash', () => {
    expect(['./mine.mjs', 'mine.js', 'stats/mine', '/a/b.cjs'].every(isModulePath)).toBe(true);
    expect(['pearson', 'max-residual', 'pearsonjs'].some(isModulePath)).toBe(false);
  });

  it('leaves built-in names as they are', async () => {
    const wishes = { statistic: 'pearson', draws: 7 };
    expect(await withOwnStatistic(wishes)).toBe(wishes);
  });

  it('that is missing, fails, or exports nothing is refused with a code', async () => {
    expect(await codeOf(join(folder, 'none.mjs'))).toBe('no-module');
    expect(await codeOf(moduleOf('fails.mjs', 'throw new Error("no");\n'))).toBe('module-failed');
    expect(await codeOf(moduleOf('bare.mjs', 'export const value = 1;\n'))).toBe('no-default-export');
    // Else the text would be looked up among the built-in names.
    expect(await codeOf(moduleOf('named.mjs', 'export default "pearson";\n'))).toBe('no-default-export');
  });
});
