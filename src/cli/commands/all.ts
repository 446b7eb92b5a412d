// The commands there are. One line and one file each; a run loads only the file of its own command.
import type { CommandFile } from './command-file.js';

export interface CommandEntry {
  readonly name: string;
  readonly operands: string;
  /** For the list of commands. */
  readonly summary: string;
  readonly load: () => Promise<CommandFile>;
}

export const commands: readonly CommandEntry[] = [
  {
    name: 'test',
    operands: 'ROW ... | FILE | -',
    summary: 'are the rows and columns of one table related?',
    load: async () => (await import('./test.js')).testCommand,
  },
  {
    name: 'batch',
    operands: 'FILE ... | -',
    summary: 'the same for many tables, one line of results each',
    load: async () => (await import('./batch.js')).batchCommand,
  },
  {
    name: 'draw',
    operands: 'ROW ... | FILE | -',
    summary: 'random tables that keep all row and column totals',
    load: async () => (await import('./draw.js')).drawCommand,
  },
  {
    name: 'power',
    operands: 'P P ...',
    summary: 'how likely is a planned study to find a difference?',
    load: async () => (await import('./power.js')).powerCommand,
  },
  {
    name: 'selfcheck',
    operands: '',
    summary: 'are the known answers found on this machine?',
    load: async () => (await import('./selfcheck.js')).selfCheckCommand,
  },
  {
    name: 'replay',
    operands: 'RESULT | -',
    summary: 'make a saved result again and compare every digit',
    load: async () => (await import('./replay.js')).replayCommand,
  },
  {
    name: 'report',
    operands: 'RESULTS | -',
    summary: 'saved results as one document',
    load: async () => (await import('./report.js')).reportCommand,
  },
  {
    name: 'adjust',
    operands: 'RESULTS | -',
    summary: 'p-values of a family of results, adjusted',
    load: async () => (await import('./adjust.js')).adjustCommand,
  },
  {
    name: 'together',
    operands: 'FILE | -',
    summary: 'several outcomes of the same subjects, adjusted over all',
    load: async () => (await import('./together.js')).togetherCommand,
  },
  {
    name: 'merge',
    operands: 'PART PART ...',
    summary: 'pool the parts of one run',
    load: async () => (await import('./merge.js')).mergeCommand,
  },
  {
    name: 'schema',
    operands: 'NAME',
    summary: 'the JSON Schemas of what is read and printed',
    load: async () => (await import('./schema.js')).schemaCommand,
  },
  {
    name: 'help',
    operands: '[TOPIC | COMMAND]',
    summary: 'definitions and sources, or the options of a command',
    load: async () => (await import('./help.js')).helpCommand,
  },
  {
    name: 'completions',
    operands: 'SHELL',
    summary: 'a script that lets bash, zsh or fish complete',
    load: async () => (await import('./completions.js')).completionsCommand,
  },
];
