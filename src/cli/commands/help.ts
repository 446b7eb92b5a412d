// keepsum help TOPIC: definitions with their sources; keepsum help COMMAND is the same as its --help.
import { usageProblem } from '../../problem/problem.js';
import { nameHint, nearest } from '../../problem/suggest.js';
import { writeOut } from '../streams/write-out.js';
import { command } from './command-file.js';
import { debugOption, helpOption } from './shared-options.js';

export const helpCommand = command({
  name: 'help',
  usage: [
    { line: 'keepsum help', words: 'the commands and the topics' },
    { line: 'keepsum help TOPIC', words: 'definitions and sources' },
    { line: 'keepsum help COMMAND', words: 'its options' },
  ],
  purpose: 'Explains a topic such as statistics, tails, designs or effects, one name, or a command.',
  examples: [
    { line: 'keepsum help statistics', words: 'every statistic: formula, range, source' },
    { line: 'keepsum help blaker', words: 'one rule alone' },
    { line: 'keepsum help power', words: 'the options of a command' },
  ],
  options: { debug: debugOption, help: helpOption },
  operandNames: async () => [
    ...(await import('../topics/all.js')).topicNames,
    ...(await import('./all.js')).commands.map((entry) => entry.name),
  ],
  async run(operands, _values, shell) {
    const [name, ...more] = operands;
    if (more.length > 0) {
      throw usageProblem({
        code: 'two-topics',
        message: `one topic at a time, not ${operands.length}`,
        hint: `write keepsum help ${name!}`,
      });
    }
    await writeOut(shell.stdout, await screenFor(name, shell.columns), 'standard output');
    return 0;
  },
});

async function screenFor(name: string | undefined, width: number): Promise<string> {
  const { commandHelp, rootHelp, topicHelp, topicList } = await import('../help.js');
  const { entryNamed, topicNames, topics } = await import('../topics/all.js');
  if (name === undefined) return `${rootHelp(width)}\n${topicList(topics, width)}`;
  const { commands } = await import('./all.js');
  const asked = commands.find((entry) => entry.name === name);
  if (asked !== undefined) return commandHelp(await asked.load(), width);
  const topic = topics.find((each) => each.name === name) ?? entryNamed(name);
  if (topic !== undefined) return topicHelp(topic, width);
  const all = [...topicNames, ...commands.map((entry) => entry.name)];
  const close = nearest(name, all);
  throw usageProblem({
    code: 'unknown-topic',
    message: `there is no topic or command "${name}"`,
    hint:
      close === undefined
        ? nameHint(
            name,
            topics.map((each) => each.name),
          )
        : `did you mean keepsum help ${close}?`,
  });
}
