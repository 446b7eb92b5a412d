// The man page, in roff with the man macros, from the same declarations as the help. The build writes it to dist/keepsum.1.
import { fold } from '../report/fold.js';
import { version } from '../result/version.js';
import { stages, type Declarations, flagOf } from './arguments/option.js';
import { commands } from './commands/all.js';
import type { CommandFile, Example } from './commands/command-file.js';
import { purpose, rootExamples } from './purpose.js';
import { statuses } from './statuses.js';
import { topics } from './topics/all.js';

/** The whole page, ending in a line feed. */
export async function manualPage(): Promise<string> {
  const files = await Promise.all(commands.map((entry) => entry.load()));
  return [
    `.TH KEEPSUM 1 "" "keepsum ${version}" "User commands"`,
    '.SH NAME',
    `keepsum ${roff('-')} are the rows and columns of a table of counts related?`,
    '.SH SYNOPSIS',
    ...files.flatMap(({ usage }) => usage.flatMap(({ line }) => ['.br', `.B ${roff(line)}`])).slice(1),
    '.SH DESCRIPTION',
    text(purpose),
    ...files.flatMap(commandPart),
    '.SH TOPICS',
    text('keepsum help TOPIC explains these, with definitions and sources:'),
    ...topics.flatMap(({ name, summary }) => item(name, summary)),
    '.SH EXIT STATUS',
    ...statuses.flatMap(([status, words]) => item(status, words)),
    '.SH EXAMPLES',
    ...exampleItems(rootExamples),
    '',
  ].join('\n');
}

const commandPart = ({ name, purpose: words, usage, examples, options }: CommandFile): string[] => [
  `.SH ${roff(`keepsum ${name}`).toUpperCase()}`,
  text(words),
  ...exampleItems(usage),
  ...stages.flatMap((stage) => optionPart(stage, options)),
  '.SS Examples',
  ...exampleItems(examples),
];

function optionPart(stage: string, options: Declarations): string[] {
  const entries = Object.entries(options).filter(([, option]) => option.stage === stage);
  if (entries.length === 0) return [];
  return [
    `.SS ${roff(stage)}`,
    ...entries.flatMap(([key, { short, placeholder, words }]) => {
      const flags = `${short === undefined ? '' : `-${short}, `}${flagOf(key)}`;
      return item(`${flags}${placeholder === undefined ? '' : ` ${placeholder}`}`, words);
    }),
  ];
}

const exampleItems = (examples: readonly Example[]): string[] =>
  examples.flatMap(({ line, words }) => item(line, words));

const item = (name: string, words: string): string[] => ['.TP', `.B ${roff(name)}`, text(words)];

/** Running text in lines that stay short when spelled: nothing in front of one that roff would take for a request. */
const text = (words: string): string =>
  fold(words, 60)
    .map((line) => roff(line).replace(/^(?=[.'])/, '\\&'))
    .join('\n');

/** Characters that roff reads, or that are not ASCII, in its own spelling; a hyphen stays one that can be copied. */
export const roff = (words: string): string =>
  words
    .replaceAll('\\', '\\e')
    .replaceAll('-', '\\-')
    .replaceAll('"', '\\(dq')
    .replaceAll('^', '\\(ha')
    .replaceAll('~', '\\(ti')
    .replaceAll("'", '\\(aq')
    .replaceAll('`', '\\(ga')
    .replace(
      /[^\0-\x7f]/gu,
      (character) => `\\[u${character.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0')}]`,
    );
