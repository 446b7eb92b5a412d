// Every malformed input there is a fixture for, through the real command: its two lines, its status, a clean standard output.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { keepsum, root } from './run-command.js';

interface Case {
  readonly title: string;
  readonly args: readonly string[];
  /** `terminal`: only with a terminal for standard input; tested with the terminals. */
  readonly needs?: 'command' | 'terminal';
  readonly message: string;
  readonly place?: string | null;
  readonly hint: string;
  readonly exitStatus: number;
}

const folder = join(root, 'fixtures/malformed');
const cases = JSON.parse(readFileSync(join(folder, 'expected.json'), 'utf8')) as Case[];
const piped = cases.filter((each) => each.needs !== 'terminal');

describe.concurrent('malformed input is refused in two lines that say what, where and what to do', () => {
  it.each(piped.map((each) => [each.title, each] as const))('%s', async (_title, { args, exitStatus, ...problem }) => {
    expect(await keepsum(args, { folder })).toEqual({ status: exitStatus, out: '', err: twoLines(problem) });
  });
});

/** An option is named once, by the message if that does it. */
function twoLines({ place, message, hint }: Omit<Case, 'args' | 'exitStatus'>): string {
  const named = !place || (place.startsWith('--') && message.includes(place));
  return `error: ${named ? '' : `${place}: `}${message}\nhint: ${hint}\n`;
}

it('no two of them read the same', () => {
  const texts = new Set(piped.map(twoLines));
  expect(texts.size).toBe(piped.length);
  expect(texts.size).toBeGreaterThanOrEqual(30);
});
