// The man page holds every command, option, topic and status, and groff sets it without a warning where groff is installed.
import { spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { flagOf } from '../../src/cli/arguments/option.js';
import { commands } from '../../src/cli/commands/all.js';
import { manualPage, roff } from '../../src/cli/manual.js';
import { topics } from '../../src/cli/topics/all.js';

const page = await manualPage();
const lines = page.split('\n');
const hasGroff = spawnSync('groff', ['--version']).error === undefined;

describe('the man page', () => {
  it('has the sections that a page needs, in the usual order', () => {
    const headings = lines.filter((line) => line.startsWith('.SH ')).map((line) => line.slice(4));
    expect(headings.slice(0, 3)).toEqual(['NAME', 'SYNOPSIS', 'DESCRIPTION']);
    expect(headings.slice(-3)).toEqual(['TOPICS', 'EXIT STATUS', 'EXAMPLES']);
  });

  it('names every option of every command, every topic and example', async () => {
    for (const { name, load } of commands) {
      const { options, examples } = await load();
      expect(page).toContain(`.SH KEEPSUM ${name.toUpperCase()}`);
      for (const key of Object.keys(options)) expect(page).toContain(roff(flagOf(key)));
      for (const { line } of examples) expect(page).toContain(`.B ${roff(line)}`);
    }
    for (const { name } of topics) expect(page).toContain(`.B ${roff(name)}\n`);
  });

  it('is ASCII, and no line of text is taken for a request', () => {
    expect(page).toMatch(/^[\x20-\x7e\n]*$/);
    const requests = lines.filter((line) => /^[.']/.test(line)).map((line) => line.split(' ')[0]);
    expect([...new Set(requests)].sort()).toEqual(['.B', '.SH', '.SS', '.TH', '.TP', '.br']);
  });

  it('spells what roff would read', () => {
    expect(roff('a\\b -1 ^ \u00b2')).toBe('a\\eb \\-1 \\(ha \\[u00B2]');
  });

  const hasMandoc = spawnSync('mandoc', ['-T', 'lint'], { input: '' }).error === undefined;
  it.skipIf(!hasMandoc)(`has nothing that mandoc complains of${hasMandoc ? '' : ' (it is not installed here)'}`, () => {
    const { stdout } = spawnSync('mandoc', ['-T', 'lint'], { input: page, encoding: 'utf8' });
    // What is wanted of pages of an operating system only.
    const ours = stdout.split('\n').filter((line) => line !== '' && !line.includes('missing date'));
    expect(ours).toEqual([]);
  });

  it(hasGroff ? 'is set by groff without a warning' : 'ends with a line feed (groff is not installed here)', () => {
    expect(page.endsWith('\n')).toBe(true);
    if (!hasGroff) return;
    const { status, stdout, stderr } = spawnSync('groff', ['-Tutf8', '-man', '-ww'], { input: page, encoding: 'utf8' });
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(stdout).toContain('--statistic');
  });
});
