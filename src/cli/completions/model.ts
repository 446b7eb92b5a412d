// What a shell can complete, read off the declarations: commands, their options, closed lists of values and operands.
import { namesOf } from '../arguments/check-value.js';
import { flagOf } from '../arguments/option.js';
import { commands } from '../commands/all.js';

export interface CompletedOption {
  readonly flag: string;
  readonly short: string | undefined;
  readonly words: string;
  /** Stands for the value; undefined for a switch. */
  readonly placeholder: string | undefined;
  /** Allowed values, where they are a closed list. */
  readonly names: readonly string[] | undefined;
}

export interface CompletedCommand {
  readonly name: string;
  readonly words: string;
  readonly options: readonly CompletedOption[];
  /** Operands, where they are a closed list; else files. */
  readonly operands: readonly string[] | undefined;
}

export const completedCommands = (): Promise<readonly CompletedCommand[]> =>
  Promise.all(
    commands.map(async ({ name, summary, load }) => {
      const file = await load();
      return {
        name,
        words: summary,
        operands: await file.operandNames?.(),
        options: Object.entries(file.options).map(([key, { short, words, placeholder, check }]) => ({
          flag: flagOf(key),
          short: short === undefined ? undefined : `-${short}`,
          words,
          placeholder,
          names: placeholder === undefined ? undefined : namesOf(check),
        })),
      };
    }),
  );
