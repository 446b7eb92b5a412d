// Words of one command -> operands and checked values. commander keeps the declared options and reads the scanned words.
import { Command, CommanderError, Option } from 'commander';
import { usageProblem } from '../../problem/problem.js';
import { flagOf, type Declarations, type Values } from './option.js';
import { scan } from './scan.js';

export interface ParsedWords<D extends Declarations> {
  readonly operands: readonly string[];
  readonly values: Values<D>;
}

/** @throws Problem (usage) for an unknown option, a missing value or one that fails its check. */
export function parseWords<D extends Declarations>(
  name: string,
  words: readonly string[],
  declarations: D,
): ParsedWords<D> {
  const { options, operands } = scan(words, declarations);
  const program = declaredCommand(name, declarations);
  try {
    program.parse([...options, '--', ...operands], { from: 'user' });
  } catch (thrown) {
    throw thrown instanceof CommanderError ? inOurWords(thrown) : thrown;
  }
  return { operands, values: given(program, declarations) };
}

/** A commander command that holds the options under their headings, and that never prints or exits by itself. */
export function declaredCommand(name: string, declarations: Declarations): Command {
  const program = new Command(name)
    .exitOverride()
    .helpOption(false)
    .helpCommand(false)
    .allowExcessArguments(true)
    .configureOutput({ writeOut: () => undefined, writeErr: () => undefined });
  for (const [key, { short, placeholder, words, stage, check, gathers }] of Object.entries(declarations)) {
    const flag = flagOf(key);
    const flags = `${short === undefined ? '' : `-${short}, `}${flag}${placeholder === undefined ? '' : ` <${placeholder}>`}`;
    const option = new Option(flags, words).helpGroup(stage);
    program.addOption(
      placeholder === undefined
        ? option
        : option.argParser((text: string, before: unknown) =>
            gathers && Array.isArray(before) ? [...before, ...(check(text, flag) as unknown[])] : check(text, flag),
          ),
    );
  }
  return program;
}

/** commander files `--no-color` under `color`; we file each option under its own name. */
function given<D extends Declarations>(program: Command, declarations: D): Values<D> {
  const store = program.opts<Record<string, unknown>>();
  const values: Record<string, unknown> = {};
  for (const option of program.options) {
    const key = Object.keys(declarations).find((name) => flagOf(name) === option.long)!;
    const value = store[option.attributeName()];
    if (option.negate ? value === false : value !== undefined && value !== false) values[key] = option.negate || value;
  }
  return values as Values<D>;
}

const inOurWords = (error: CommanderError): Error =>
  usageProblem({
    code: error.code.replace('commander.', ''),
    message: error.message.replace(/^error: /, ''),
    hint: 'keepsum COMMAND --help shows how the command is called',
  });
