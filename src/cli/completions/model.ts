// What a shell can complete, read off the declarations: commands, their options, closed lists of values and operands.
import { cutTo } from '../../report/display-width.js';
import { namesOf } from '../arguments/check-value.js';
import { flagOf } from '../arguments/option.js';
import { commands } from '../commands/all.js';

export interface CompletedOption {
  readonly flag: string;
  readonly short: string | undefined;
  readonly words: string;
  /** Stands for the value; undefined for a switch. */
  readonly placeholder: string | undefined;
  readonly repeats: boolean;
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

const longestWords = 60;

/** Words beside a name in a narrow list: the first clause, and in place of names that the shell lists itself, what they are. */
function shortWords(key: string, words: string, names: readonly string[] | undefined): string {
  if (names !== undefined && words.startsWith(names.slice(0, 2).join(', '))) {
    const standard = names.find((name) => words.endsWith(`(${name})`));
    return `the ${flagOf(key).slice(2).replaceAll('-', ' ')}${standard === undefined ? '' : ` (${standard})`}`;
  }
  const clause = words.split(/[:;] /)[0]!;
  return cutTo(
    words.length > longestWords && clause.length > 20 ? clause.replace(/ \([^)]*$/, '') : words,
    longestWords,
  );
}

export const completedCommands = (): Promise<readonly CompletedCommand[]> =>
  Promise.all(
    commands.map(async ({ name, summary, load }) => {
      const file = await load();
      return {
        name,
        words: summary,
        operands: await file.operandNames?.(),
        options: Object.entries(file.options).map(([key, { short, words, placeholder, check, gathers }]) => ({
          flag: flagOf(key),
          short: short === undefined ? undefined : `-${short}`,
          words: shortWords(key, words, placeholder === undefined ? undefined : namesOf(check)),
          placeholder,
          repeats: gathers === true,
          names: placeholder === undefined ? undefined : namesOf(check),
        })),
      };
    }),
  );
