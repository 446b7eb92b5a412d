// What a command is to the frame: one file that says how it is called and what it does.
import type { Declarations, Values } from '../arguments/option.js';
import type { Shell } from '../shell.js';

/** A command line and what it does. */
export interface Example {
  readonly line: string;
  readonly words: string;
}

export interface CommandFile<D extends Declarations = Declarations> {
  readonly name: string;
  /** The ways to call it. */
  readonly usage: readonly Example[];
  /** One sentence. */
  readonly purpose: string;
  /** As typed at the root of a clone; a test runs every one. */
  readonly examples: readonly Example[];
  readonly options: D;
  /** Words that may stand as operands, where they are a closed list; for completions. */
  readonly operandNames?: () => Promise<readonly string[]>;
  /** Does the work and returns the exit status. */
  run(operands: readonly string[], values: Values<D>, shell: Shell): Promise<number>;
}

/** Keeps the types of the options inside one file, and hands the frame the general form. */
export const command = <D extends Declarations>(file: CommandFile<D>): CommandFile => file as unknown as CommandFile;
