// keepsum completions SHELL: a script that lets a shell complete commands, options and their values.
import { usageProblem } from '../../problem/problem.js';
import { nameHint } from '../../problem/suggest.js';
import { command } from './command-file.js';
import { destinationFor, sharedOptions } from './shared-options.js';

const shells = ['bash', 'zsh', 'fish'] as const;

export const completionsCommand = command({
  name: 'completions',
  usage: [{ line: 'keepsum completions bash', words: 'or zsh, or fish: print the script' }],
  purpose: 'Prints a script that lets your shell complete commands, options and their values.',
  examples: [{ line: 'keepsum completions bash', words: 'in ~/.bashrc: . <(keepsum completions bash)' }],
  options: sharedOptions,
  operandNames: async () => shells,
  async run(operands, values, shell) {
    const asked = checkShell(operands);
    const destination = await destinationFor(values.output, shell);
    const { completedCommands } = await import('../completions/model.js');
    const commands = await completedCommands();
    await destination.write((await scriptOf(asked))(commands));
    return 0;
  },
});

async function scriptOf(shell: (typeof shells)[number]) {
  switch (shell) {
    case 'bash':
      return (await import('../completions/bash.js')).bashScript;
    case 'zsh':
      return (await import('../completions/zsh.js')).zshScript;
    case 'fish':
      return (await import('../completions/fish.js')).fishScript;
  }
}

function checkShell([name, ...more]: readonly string[]): (typeof shells)[number] {
  const found = more.length === 0 ? shells.find((each) => each === name) : undefined;
  if (found !== undefined) return found;
  throw usageProblem({
    code: name === undefined ? 'no-shell-named' : 'unknown-shell',
    message:
      name === undefined
        ? 'no shell is named'
        : more.length > 0
          ? `one shell at a time, not ${more.length + 1}`
          : `there are no completions for "${name}"`,
    hint: name === undefined ? 'write keepsum completions bash' : nameHint(name, shells),
  });
}
