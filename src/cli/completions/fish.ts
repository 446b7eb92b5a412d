// The completion script for fish, with the words of the help beside each name.
import type { CompletedCommand, CompletedOption } from './model.js';

export const fishScript = (commands: readonly CompletedCommand[]): string =>
  `# Completions of keepsum for fish: keepsum completions fish | source
${[...commands.map(commandLine), ...commands.flatMap(optionLines)].join('\n')}
`;

const commandLine = ({ name, words }: CompletedCommand): string =>
  `complete -c keepsum -f -n __fish_use_subcommand -a ${name} -d ${quotedWord(words)}`;

const optionLines = ({ name, options, operands }: CompletedCommand): string[] => {
  const here = `complete -c keepsum -n '__fish_seen_subcommand_from ${name}'`;
  return [
    ...options.map((option) => `${here} ${optionWords(option)}`),
    ...(operands === undefined ? [] : [`${here} -f -a ${quotedWord(operands.join(' '))}`]),
  ];
};

const optionWords = ({ flag, short, words, placeholder, names }: CompletedOption): string =>
  [
    `-l ${flag.slice(2)}`,
    ...(short === undefined ? [] : [`-s ${short.slice(1)}`]),
    ...(placeholder === undefined ? [] : names === undefined ? ['-r'] : [`-x -a ${quotedWord(names.join(' '))}`]),
    `-d ${quotedWord(words)}`,
  ].join(' ');

const quotedWord = (text: string): string => `'${text.replace(/[\\']/g, '\\$&')}'`;
