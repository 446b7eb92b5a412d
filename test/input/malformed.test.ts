// Every malformed input of fixtures/malformed against its whole message. Entries that need the command line (they say so)
// are run by the tests of the command.
import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { CrossTableOptions, InlineOptions, RecordOptions } from '../../src/input/index.js';
import { readCrossTable, readInline, readRecords } from '../../src/input/index.js';
import { piecesOf, problemOfAsync } from './text-input.js';

interface Entry {
  title: string;
  args: string[];
  exitStatus: number;
  needs?: 'command';
  form?: 'inline' | 'cross-table' | 'records';
  file?: string;
  operands?: string[];
  options?: object;
  code?: string;
  message?: string;
  place?: string | null;
  hint?: string;
}

const folder = new URL('../../fixtures/malformed/', import.meta.url);
const bytesIn = (file: string): Uint8Array => readFileSync(new URL(file, folder));
const entries = JSON.parse(readFileSync(new URL('expected.json', folder), 'utf8')) as Entry[];
const ofInput = entries.filter((entry) => entry.needs === undefined);

async function read({ form, file, operands, options }: Entry): Promise<unknown> {
  if (form === 'inline') return readInline(operands!, options as InlineOptions);
  const source = { sourceName: file!, ...options };
  if (form === 'cross-table') return readCrossTable(bytesIn(file!), source as CrossTableOptions);
  const again = (): AsyncIterable<Uint8Array> => piecesOf(bytesIn(file!), 5);
  return readRecords(again(), { ...source, reread: again } as RecordOptions);
}

describe('a malformed input is refused with its whole message, place and hint', () => {
  it.each(ofInput.map((entry) => [entry.title, entry] as const))('%s', async (_, entry) => {
    const { code, message, place, hint, exitStatus } = await problemOfAsync(() => read(entry));
    expect({ code, message, place: place ?? null, hint, exitStatus }).toEqual({
      code: entry.code,
      message: entry.message,
      place: entry.place,
      hint: entry.hint,
      exitStatus: entry.exitStatus,
    });
  });

  it('the message is one sentence without a full stop, and the hint says what to do', () => {
    for (const { message, hint } of ofInput) {
      expect(message).toMatch(/[^.]$/);
      expect(hint).toMatch(/^[^.]+.*[^.]$/s);
    }
  });
});

it('there are at least 30 malformed inputs, and every file among them is used', () => {
  expect(ofInput.length).toBeGreaterThanOrEqual(30);
  expect(new Set(entries.map(({ title }) => title)).size).toBe(entries.length);
  const files = readdirSync(folder).filter((name) => name !== 'expected.json' && !name.endsWith('.md'));
  expect(new Set(ofInput.flatMap(({ file }) => file ?? []))).toEqual(new Set(files));
});
