// The completion scripts hold what the commands declare; bash runs its own, zsh and fish check theirs where they are installed.
import { execFileSync, spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { flagOf } from '../../src/cli/arguments/option.js';
import { commands } from '../../src/cli/commands/all.js';
import { bashScript } from '../../src/cli/completions/bash.js';
import { fishScript } from '../../src/cli/completions/fish.js';
import { completedCommands } from '../../src/cli/completions/model.js';
import { zshScript } from '../../src/cli/completions/zsh.js';
import { reportFormats } from '../../src/report/formats.js';
import { statisticNames } from '../../src/statistic/registry.js';

const model = await completedCommands();
const files = await Promise.all(commands.map((entry) => entry.load()));
const scripts = { bash: bashScript(model), zsh: zshScript(model), fish: fishScript(model) };
const isInstalled = (shell: string): boolean => spawnSync(shell, ['--version']).error === undefined;

/** What bash offers for the last of these words. */
function offered(...words: string[]): string[] {
  const asked = `${scripts.bash}\nCOMP_WORDS=(${words.map((word) => `'${word}'`).join(' ')}); COMP_CWORD=${words.length - 1}; _keepsum; printf '%s\\n' "\${COMPREPLY[@]}"`;
  return execFileSync('bash', ['--norc', '-c', asked], { encoding: 'utf8' })
    .split('\n')
    .filter((line) => line !== '');
}

describe('bash, running its script, offers', () => {
  it('the commands', () => {
    expect(offered('keepsum', '')).toEqual([...commands.map(({ name }) => name), '--help', '--version']);
    expect(offered('keepsum', 'po')).toEqual(['power']);
  });

  it('every option of every command', () => {
    for (const file of files) {
      const flags = Object.keys(file.options).map(flagOf);
      expect(offered('keepsum', file.name, '--')).toEqual(flags);
    }
  });

  it('the values of closed lists, also after an equals sign, and none where a value is free', () => {
    expect(offered('keepsum', 'test', '8,2', '--format', '')).toEqual(reportFormats);
    expect(offered('keepsum', 'test', '8,2', '--format', '=', 'js')).toEqual(['json']);
    expect(offered('keepsum', 'test', '--statistic', '')).toEqual(expect.arrayContaining([...statisticNames]));
    expect(offered('keepsum', 'test', '--seed', '')).toEqual([]);
  });

  it('the names that a command takes', () => {
    expect(offered('keepsum', 'completions', '')).toEqual(['bash', 'zsh', 'fish']);
    expect(offered('keepsum', 'help', 'blak')).toEqual(['blaker']);
    expect(offered('keepsum', 'schema', 'res')).toContain('result');
  });

  it('nothing for a file, which bash itself completes', () => {
    expect(offered('keepsum', 'test', 'fix')).toEqual([]);
    expect(scripts.bash).toContain('complete -o default');
  });
});

describe.each(['zsh', 'fish'] as const)('the script for %s', (shell) => {
  it('names every command and every option with its allowed values', () => {
    for (const { name, options } of model) {
      expect(scripts[shell]).toContain(name);
      for (const { flag, names } of options) {
        expect(scripts[shell]).toContain(shell === 'fish' ? `-l ${flag.slice(2)} ` : flag);
        if (names !== undefined) expect(scripts[shell]).toContain(names.join(' '));
      }
    }
  });

  const installed = isInstalled(shell);
  it(installed ? 'is read without complaint by it' : `closes its quotes (${shell} is not installed here)`, () => {
    if (installed) execFileSync(shell, ['-n', '-c', scripts[shell]]);
    // In both, a text in single quotes ends at the next one that is not escaped; '\'' is three of them.
    const text = shell === 'fish' ? scripts.fish.replace(/\\['\\]/g, '') : scripts.zsh.replaceAll("\\'", '');
    for (const line of text.split('\n').filter((one) => !one.startsWith('#'))) {
      expect((line.match(/'/g) ?? []).length % 2, line).toBe(0);
    }
  });
});
