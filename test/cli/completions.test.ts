// The completion scripts hold what the commands declare; bash runs its own, zsh and fish check theirs where they are installed.
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
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

  it('says in a few words what a name stands for', () => {
    for (const { options } of model) {
      for (const { flag, words } of options) expect(words.length, flag).toBeLessThanOrEqual(60);
    }
  });
});

/** What fish offers for each of these beginnings, without the words beside. */
function offeredByFish(...lines: string[]): string[][] {
  const asked = [scripts.fish, ...lines.map((line) => `complete -C '${line}'; echo ::`)].join('\n');
  const home = mkdtempSync(join(tmpdir(), 'keepsum-fish-'));
  const environment = { ...process.env, HOME: home, XDG_CONFIG_HOME: home, XDG_DATA_HOME: home };
  const out = execFileSync('fish', ['--no-config', '-c', asked], { encoding: 'utf8', env: environment });
  rmSync(home, { recursive: true });
  const parts = out.split('::\n').slice(0, -1);
  return parts.map((part) => part.split('\n').flatMap((each) => (each === '' ? [] : [each.split('\t')[0]!])));
}

const hasFish = isInstalled('fish');
it.skipIf(!hasFish)(`fish, running its script, offers the same${hasFish ? '' : ' (not installed here)'}`, () => {
  const asked = ['po', 'test --format js', 'test --two-', 'help blak', 'schema res', 'test fixtures/demo/orchi', ''];
  expect(offeredByFish(...asked.map((line) => `keepsum ${line}`))).toEqual([
    ['power'],
    ['json'],
    ['--two-sided-rule'],
    ['blaker'],
    ['result'],
    ['fixtures/demo/orchid-forms.tsv'],
    commands.map(({ name }) => name).sort(),
  ]);
});

/** What becomes of each of these lines when zsh, with a terminal of its own, is asked to complete it. */
function completedByZsh(...lines: string[]): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'keepsum-zsh-'));
  const script = join(folder, '_keepsum');
  writeFileSync(script, scripts.zsh);
  const setting = [
    'PS1=; unsetopt zle_bracketed_paste; autoload -Uz compinit; compinit -u -D',
    `source ${script}`,
    'show() { print -r -- "<<$BUFFER>>"; BUFFER=; zle reset-prompt }; zle -N show; bindkey "^X" show; print -r READY',
  ].join('; ');
  const asked = `zmodload zsh/zpty; zpty z zsh -f -i; zpty -w z "$1"; zpty -r z out '*READY*READY*'; shift
    for line in "$@"; do
      zpty -w -n z "$line"$'\\t'$'\\x18'; zpty -r z out '*<<*>>*'; print -r -- \${\${out#*<<}%>>*}
    done; zpty -d z`;
  const out = execFileSync('zsh', ['-f', '-c', asked, 'zsh', setting, ...lines], { encoding: 'utf8', timeout: 60_000 });
  rmSync(folder, { recursive: true });
  return out.split('\n').slice(0, -1);
}

const hasZsh = isInstalled('zsh');
it.skipIf(!hasZsh)(`zsh, running its script, completes the same${hasZsh ? '' : ' (not installed here)'}`, () => {
  const lines = ['po', 'test --format js', 'test --format=js', 'help blak', 'schema res', 'test fixtures/demo/orchi'];
  expect(completedByZsh(...lines.map((line) => `keepsum ${line}`)).map((line) => line.trimEnd())).toEqual([
    'keepsum power',
    'keepsum test --format json',
    'keepsum test --format=json',
    'keepsum help blaker',
    'keepsum schema result',
    'keepsum test fixtures/demo/orchid-forms.tsv',
  ]);
});
