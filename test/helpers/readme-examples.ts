// The examples of the README: fenced `console` blocks, each `$ ` line a command, what follows it the output.
import { readFileSync, writeFileSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { resolve } from 'node:path';
import { inShell, root } from '../process/run-command.js';

const readme = resolve(root, 'README.md');

export interface Example {
  readonly command: string;
  readonly output: string;
}

const blockPattern = /```console\n([\s\S]*?)```/g;

/** Splits a block into its commands and what is shown below each. */
function examplesIn(block: string): Example[] {
  return block
    .split(/^\$ /m)
    .slice(1)
    .map((part) => {
      const end = part.indexOf('\n');
      return { command: part.slice(0, end), output: part.slice(end + 1).trimEnd() };
    });
}

/** Commands that install, which a test of the examples must not run. */
const installs = (command: string): boolean => command.startsWith('npm ');

export const readmeExamples = (): Example[] =>
  [...readFileSync(readme, 'utf8').matchAll(blockPattern)]
    .flatMap(([, block]) => examplesIn(block!))
    .filter(({ command }) => !installs(command));

/** The picture that the README shows, and the example that draws it somewhere else. */
const pictureFile = resolve(root, 'fixtures/demo/seed-lots.svg');
const drawsPicture = ({ command }: Example): boolean => command.includes('--plot /tmp/seed-lots.svg');

/** The picture as it is shown, and as the example's command draws it now. */
export async function pictureShownAndDrawn(): Promise<{ shown: string; drawn: string; text: string }> {
  const folder = await mkdtemp(resolve(tmpdir(), 'keepsum-picture-'));
  try {
    const file = resolve(folder, 'seed-lots.svg');
    const { command } = readmeExamples().find(drawsPicture)!;
    await inShell(command.replace('/tmp/seed-lots.svg', file));
    return {
      shown: readFileSync(pictureFile, 'utf8'),
      drawn: readFileSync(file, 'utf8'),
      text: readFileSync(readme, 'utf8'),
    };
  } finally {
    await rm(folder, { recursive: true });
  }
}

/** Runs one example as written, in the project's folder, and gives what it printed on both streams. */
export async function outputOf(command: string): Promise<string> {
  const { out, err } = await inShell(command);
  return (err + out).trimEnd();
}

/** Writes the real output under every example (run after a deliberate change, then read the difference). */
export async function refreshReadme(): Promise<void> {
  let text = readFileSync(readme, 'utf8');
  for (const { command, output } of readmeExamples()) {
    const shown = `$ ${command}\n${output === '' ? '' : `${output}\n`}`;
    const real = await outputOf(command);
    text = text.replace(shown, () => `$ ${command}\n${real}\n`);
  }
  writeFileSync(readme, text);
  writeFileSync(pictureFile, (await pictureShownAndDrawn()).drawn);
}
