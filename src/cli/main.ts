// The frame of the command: which command, with which words; what goes wrong becomes two lines and an exit status.
import { parseWords } from './arguments/parse.js';
import { usageProblem } from '../problem/problem.js';
import { nameHint } from '../problem/suggest.js';
import { version } from '../result/version.js';
import { commands, type CommandEntry } from './commands/all.js';
import { endingOf } from './problem-text.js';
import { processShell, type Shell } from './shell.js';
import { remark, writeOut } from './streams/write-out.js';

/**
 * Runs one command line (the words after the program's name) and returns the exit status.
 * Nothing listens for Ctrl-C: the signal itself ends the process at once, exact work included, which no listener could; a shell calls
 * that status 130 and, unlike after an exit with 130, ends the loop or script around it too. There is nothing to tidy.
 */
export async function main(words: readonly string[], shell: Shell = processShell()): Promise<number> {
  // Without a listener, a stream whose reader has gone ends the process with a stack trace.
  shell.stdout.on('error', () => undefined);
  shell.stderr.on('error', () => undefined);
  try {
    return await runCommand(words, shell);
  } catch (thrown) {
    const ending = endingOf(thrown, words.includes('--debug'));
    await remark(shell.stderr, ending.text);
    return ending.status;
  }
}

async function runCommand([name, ...words]: readonly string[], shell: Shell): Promise<number> {
  if (name === undefined) {
    await remark(shell.stderr, (await import('./help.js')).firstScreen(shell.columns));
    return 2;
  }
  if (name === '--version') return print(`${version}\n`, shell);
  if (name === '--help' || name === '-h') return print(await rootHelp(shell), shell);
  const file = await commandNamed(name, words).load();
  if (asksForHelp(words)) return print((await import('./help.js')).commandHelp(file, shell.columns), shell);
  const { operands, values } = parseWords(file.name, words, file.options);
  return file.run(operands, values, shell);
}

function commandNamed(name: string, words: readonly string[]): CommandEntry {
  const found = commands.find((entry) => entry.name === name);
  if (found !== undefined) return found;
  if (name.startsWith('-')) {
    throw usageProblem({
      code: 'no-command',
      message: `${name} stands where a command is wanted`,
      hint: 'options come after the command, as in keepsum test 8,2 1,9 --format json',
    });
  }
  const meantATable = /[0-9],[0-9]|^\d+$|\.|\//.test(name);
  throw usageProblem({
    code: 'unknown-command',
    message: `there is no command "${name}"`,
    hint: meantATable
      ? `to test a table, write keepsum test ${[name, ...words].join(' ')}`
      : nameHint(
          name,
          commands.map((entry) => entry.name),
        ),
  });
}

/** Asked for anywhere among the options: whoever asks for help is not told first what else is wrong. */
function asksForHelp(words: readonly string[]): boolean {
  const end = words.indexOf('--');
  return (end < 0 ? words : words.slice(0, end)).some((word) => word === '--help' || word === '-h');
}

const rootHelp = async (shell: Shell): Promise<string> => (await import('./help.js')).rootHelp(shell.columns);

async function print(text: string, shell: Shell): Promise<number> {
  await writeOut(shell.stdout, text, 'standard output');
  return 0;
}
