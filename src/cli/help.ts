// Help screens: one sentence, how to call it, three examples, then the options in the order of the flow, then the exit statuses.
import { Help, type Option } from 'commander';
import { declaredCommand } from './arguments/parse.js';
import { stages } from './arguments/option.js';
import { fold } from '../report/fold.js';
import { commands } from './commands/all.js';
import type { CommandFile, Example } from './commands/command-file.js';
import { purpose, rootExamples } from './purpose.js';
import { statuses } from './statuses.js';
import type { Topic } from './topics/topic.js';

/** What is shown when nothing was asked. */
export const firstScreen = (width: number): string => screen(firstParts(width));

/** What `keepsum --help` prints. */
export const rootHelp = (width: number): string =>
  screen([...firstParts(width), section('Exit status', statuses, width)]);

function firstParts(width: number): string[] {
  const listed = commands.map(({ name, operands, summary }) => [`${name} ${operands}`.trimEnd(), summary] as const);
  return [
    wrapped(purpose, width),
    section('Usage: keepsum COMMAND ...', listed, width),
    section('Examples', exampleItems(rootExamples), width),
    section(
      'Anywhere',
      [
        ['--help, -h', 'this, or after a command its options'],
        ['--version', 'the version'],
      ],
      width,
    ),
  ];
}

/** What `keepsum COMMAND --help` prints. */
export function commandHelp(file: CommandFile, width: number): string {
  const { options } = declaredCommand(file.name, file.options);
  const groups = stages.map((stage) =>
    section(
      stage,
      options
        .filter((option) => option.helpGroupHeading === stage)
        .map((option) => [term(option), option.description] as const),
      width,
    ),
  );
  return screen([...opening(file, width), ...groups, section('Exit status', statuses, width)]);
}

/** The first screen alone: for someone who called a command with nothing to work on. */
export const shortHelp = (file: CommandFile, width: number): string =>
  screen([...opening(file, width), `keepsum ${file.name} --help lists the options.`]);

/** What `keepsum help TOPIC` prints. */
export const topicHelp = ({ opening: words, entries }: Topic, width: number): string =>
  screen([
    words === '' ? '' : wrapped(words, width),
    ...entries.map(({ name, lines }) =>
      [name, ...lines.flatMap((line) => fold(line, width, { first: 2, rest: 4 }))].join('\n'),
    ),
  ]);

/** What may be asked of `keepsum help`. */
export const topicList = (topics: readonly Topic[], width: number): string =>
  screen([
    section(
      'Topics (keepsum help TOPIC)',
      topics.map(({ name, summary }) => [name, summary] as const),
      width,
    ),
  ]);

const opening = (file: CommandFile, width: number): string[] => [
  wrapped(file.purpose, width),
  section('Usage', exampleItems(file.usage), width),
  section('Examples', exampleItems(file.examples), width),
];

const exampleItems = (examples: readonly Example[]): (readonly [string, string])[] =>
  examples.map(({ line, words }) => [line, words] as const);

const term = (option: Option): string =>
  [option.short, option.long].filter((flag) => flag !== undefined).join(', ') +
  (/<(.+)>/.exec(option.flags)?.[1] ?? '').replace(/^(?=.)/, ' ');

/** Items under a heading; long terms push their words to the next line instead of widening the column for all. */
function section(heading: string, items: readonly (readonly [string, string])[], width: number): string {
  if (items.length === 0) return '';
  const helper = wrapper(width);
  const column = Math.min(30, Math.max(...items.map(([left]) => left.length)));
  if (width - column < leastBeside) return `${heading}\n${items.flatMap((item) => stacked(item, width)).join('\n')}`;
  const lines = items.map(([left, words]) =>
    left.length <= column || words === ''
      ? helper.formatItem(left, column, words, helper)
      : `  ${left}\n${helper.formatItem('', column, words, helper)}`,
  );
  return `${heading}\n${lines.join('\n')}`;
}

/** Columns for words beside their terms, and what stands between; in less, words stand below. */
const leastBeside = 28;

const stacked = ([left, words]: readonly [string, string], width: number): string[] => [
  `  ${left}`,
  ...(words === '' ? [] : fold(words, width, { first: 6, rest: 6 })),
];

const wrapped = (text: string, width: number): string => wrapper(width).boxWrap(text, width);

/** commander's own wrapping, told to wrap narrow columns too. */
function wrapper(width: number): Help {
  const helper = new Help();
  helper.prepareContext({ helpWidth: width });
  helper.minWidthToWrap = 20;
  return helper;
}

const screen = (parts: readonly string[]): string => `${parts.filter((part) => part !== '').join('\n\n')}\n`;
