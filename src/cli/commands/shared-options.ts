// Options that every command takes.
import { anyText } from '../arguments/check-value.js';
import { toggle, valued } from '../arguments/option.js';
import type { Shell } from '../shell.js';
import { writeOut, type Destination } from '../streams/write-out.js';

export const helpOption = toggle('Other', 'this help', 'h');
export const debugOption = toggle('Other', 'after an unexpected error, show where it happened');
export const outputOption = valued(
  'The report',
  'FILE',
  anyText,
  'write to FILE, put in place only when whole; - is standard output',
  'o',
);

export const sharedOptions = { output: outputOption, debug: debugOption, help: helpOption };

/** Tries the file now, so that a bad path is known before any work. */
export async function destinationFor(
  output: string | undefined,
  shell: Shell,
  inputPath: string | null = null,
): Promise<Destination> {
  if (output === undefined || output === '-') {
    return { write: (text) => writeOut(shell.stdout, text, 'standard output') };
  }
  return (await import('../streams/output-file.js')).toFile(output, inputPath);
}
