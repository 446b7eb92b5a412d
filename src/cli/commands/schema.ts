// keepsum schema NAME: the published shapes, for programs that read our output.
import { usageProblem } from '../../problem/problem.js';
import { nameHint } from '../../problem/suggest.js';
import { destinationFor, sharedOptions } from './shared-options.js';
import { command } from './command-file.js';

const schemaNames = ['result', 'power', 'selfcheck'] as const;

export const schemaCommand = command({
  name: 'schema',
  usage: [{ line: 'keepsum schema result', words: 'print it' }],
  purpose: 'Prints the JSON Schema (draft 2020-12) that every JSON result satisfies.',
  examples: [{ line: 'keepsum schema result', words: 'on the screen, or on to another program' }],
  options: sharedOptions,
  async run(operands, values, shell) {
    const name = checkName(operands);
    const destination = await destinationFor(values.output, shell);
    await destination.write(`${JSON.stringify(await schemaNamed(name), null, 2)}\n`);
    return 0;
  },
});

async function schemaNamed(name: (typeof schemaNames)[number]): Promise<object> {
  switch (name) {
    case 'result':
      return (await import('../../result/schema.js')).resultJsonSchema();
    case 'power':
      return (await import('../../result/power-declaration.js')).powerJsonSchema();
    case 'selfcheck':
      return (await import('../../result/self-check-declaration.js')).selfCheckJsonSchema();
  }
}

function checkName(operands: readonly string[]): (typeof schemaNames)[number] {
  const [name, ...more] = operands;
  if (name === undefined || more.length > 0) {
    throw usageProblem({
      code: name === undefined ? 'no-schema-named' : 'too-many-names',
      message: name === undefined ? 'no schema is named' : `one schema at a time, not ${operands.length}`,
      hint: `write keepsum schema ${schemaNames[0]}`,
    });
  }
  const found = schemaNames.find((each) => each === name);
  if (found === undefined) {
    throw usageProblem({
      code: 'unknown-schema',
      message: `there is no schema named "${name}"`,
      hint: nameHint(name, schemaNames),
    });
  }
  return found;
}
