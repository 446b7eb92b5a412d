import { describe, expect, it } from 'vitest';
import { flagOf, stages } from '../../src/cli/arguments/option.js';
import { commands } from '../../src/cli/commands/all.js';
import { commandHelp, rootHelp, shortHelp } from '../../src/cli/help.js';

const files = await Promise.all(commands.map((entry) => entry.load()));
const longest = (text: string): number => Math.max(...text.split('\n').map((line) => line.length));

describe('the help', () => {
  it('lists every command under its name', () => {
    for (const { name } of commands) expect(rootHelp(80)).toContain(`\n  ${name} `);
    expect(files.map((file) => file.name)).toEqual(commands.map((entry) => entry.name));
  });

  it.each(files.map((file) => [file.name, file] as const))(
    'of %s shows every option, under headings in the order of the flow',
    (_name, file) => {
      const text = commandHelp(file, 80);
      for (const key of Object.keys(file.options))
        expect(text).toMatch(new RegExp(`^  (-\\w, )?${flagOf(key)}\\b`, 'm'));
      const places = stages.map((stage) => text.indexOf(`\n${stage}\n`)).filter((place) => place >= 0);
      expect(places).toEqual([...places].sort((a, b) => a - b));
      expect(text.indexOf('Examples')).toBeLessThan(places[0]!);
      expect(text).toContain('130  interrupted');
    },
  );

  it.each(files.map((file) => [file.name, file] as const))(
    'of %s keeps to the width but for commands to copy',
    (_name, file) => {
      const prose = (text: string): string =>
        text
          .split('\n')
          .filter((line) => !line.startsWith('  keepsum '))
          .join('\n');
      for (const width of [40, 60, 80]) {
        expect(longest(prose(commandHelp(file, width)))).toBeLessThanOrEqual(width);
        expect(longest(prose(rootHelp(width)))).toBeLessThanOrEqual(width);
      }
    },
  );

  it('that is short says where the rest is', () => {
    expect(shortHelp(files[0]!, 80)).toContain('keepsum test --help');
  });
});
