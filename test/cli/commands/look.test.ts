import { describe, expect, it } from 'vitest';
import { lookFor, type LookValues } from '../../../src/cli/commands/look.js';
import type { Shell } from '../../../src/cli/shell.js';
import { fakeShell } from '../fake-shell.js';

const coloured = async (values: LookValues, changes: Partial<Shell>): Promise<boolean> =>
  (await lookFor(values, fakeShell(changes))).paint.bold('x') !== 'x';

describe('colour', () => {
  it('is there at a terminal', async () => {
    expect(await coloured({}, { stdoutIsTerminal: true })).toBe(true);
  });

  it.each<[string, LookValues, Partial<Shell>]>([
    ['in a pipe or a file', {}, { stdoutIsTerminal: false }],
    ['with --output', { output: 'x' }, { stdoutIsTerminal: true }],
    ['with --no-color', { noColor: true }, { stdoutIsTerminal: true }],
    ['where NO_COLOR holds anything', {}, { stdoutIsTerminal: true, environment: { NO_COLOR: '0' } }],
    ['at a dumb terminal', {}, { stdoutIsTerminal: true, environment: { TERM: 'dumb' } }],
  ])('is not there %s', async (_case, values, changes) => {
    expect(await coloured(values, changes)).toBe(false);
  });

  it('is not switched off by an empty NO_COLOR, nor by --output -', async () => {
    expect(await coloured({ output: '-' }, { stdoutIsTerminal: true, environment: { NO_COLOR: '' } })).toBe(true);
  });

  it('follows --color against the environment', async () => {
    expect(await coloured({ color: true }, { stdoutIsTerminal: false, environment: { NO_COLOR: '1' } })).toBe(true);
  });

  it('only wraps the words, in every role', async () => {
    const { paint } = await lookFor({ color: true }, fakeShell());
    for (const role of ['bold', 'warn'] as const) {
      expect(paint[role]('words').replace(/\u001b\[\d+m/g, '')).toBe('words');
    }
  });
});

it('the width is that of the terminal unless told', async () => {
  expect((await lookFor({}, fakeShell({ columns: 132 }))).width).toBe(132);
  expect((await lookFor({ width: 60 }, fakeShell({ columns: 132 }))).width).toBe(60);
});
