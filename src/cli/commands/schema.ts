// keepsum schema NAME: the published shapes, for programs that read our output.
import { usageProblem } from '../../problem/problem.js';
import { nameHint } from '../../problem/suggest.js';
import { destinationFor, sharedOptions } from './shared-options.js';
import { command } from './command-file.js';

const schemas: Readonly<Record<string, () => Promise<object>>> = {
  result: async () => (await import('../../result/schema.js')).resultJsonSchema(),
  power: async () => (await import('../../result/power-declaration.js')).powerJsonSchema(),
  selfcheck: async () => (await import('../../result/self-check-declaration.js')).selfCheckJsonSchema(),
  'reference-answers': async () => (await import('../../self-check/read-answers.js')).referenceAnswersJsonSchema(),
  together: async () => (await import('../../result/together-declaration.js')).togetherJsonSchema(),
  'adjusted-line': async () => (await import('../../result/adjusted-declaration.js')).adjustedJsonSchema(),
  replay: async () => (await import('../../result/replay-declaration.js')).replayJsonSchema(),
  'batch-line': async () => (await import('../../batch/schemas.js')).batchLineJsonSchema(),
  'compact-line': async () => (await import('../../batch/schemas.js')).compactLineJsonSchema(),
  'error-line': async () => (await import('../../batch/schemas.js')).errorLineJsonSchema(),
  'part-end': async () => (await import('../../batch/schemas.js')).partEndJsonSchema(),
};
const schemaNames = Object.keys(schemas);

export const schemaCommand = command({
  name: 'schema',
  usage: [
    { line: 'keepsum schema result', words: 'what --format json prints' },
    { line: 'keepsum schema batch-line', words: 'a line that keepsum batch reads' },
    { line: 'keepsum schema compact-line', words: 'a line that it writes' },
    { line: 'keepsum schema error-line', words: 'a line that it writes for a table that cannot be used' },
    { line: 'keepsum schema part-end', words: 'the last line of a part that --shard made' },
    { line: 'keepsum schema reference-answers', words: 'cases for keepsum selfcheck --answers' },
  ],
  purpose: 'Prints the JSON Schema (draft 2020-12) that every such document satisfies.',
  examples: [{ line: 'keepsum schema result', words: 'on the screen, or on to another program' }],
  options: sharedOptions,
  operandNames: async () => schemaNames,
  async run(operands, values, shell) {
    const schema = schemas[nameIn(operands)]!;
    const destination = await destinationFor(values.output, shell);
    await destination.write(`${JSON.stringify(await schema(), null, 2)}\n`);
    return 0;
  },
});

function nameIn(operands: readonly string[]): string {
  const [name, ...more] = operands;
  if (name === undefined || more.length > 0) {
    throw usageProblem({
      code: name === undefined ? 'no-schema-named' : 'too-many-names',
      message: name === undefined ? 'no schema is named' : `one schema at a time, not ${operands.length}`,
      hint: `write keepsum schema ${schemaNames[0]}`,
    });
  }
  if (!schemaNames.includes(name)) {
    throw usageProblem({
      code: 'unknown-schema',
      message: `there is no schema named "${name}"`,
      hint: nameHint(name, schemaNames),
    });
  }
  return name;
}
