// Every line that a batch writes is held against the published schemas, by a validator that knows nothing of our code.
import { Ajv2020 } from 'ajv/dist/2020.js';
import type { CompactLine, ErrorLine, FullLine } from '../../src/batch/lines.js';
import {
  batchLineJsonSchema,
  compactLineJsonSchema,
  errorLineJsonSchema,
  partEndJsonSchema,
} from '../../src/batch/schemas.js';
import { resultJsonSchema } from '../../src/result/schema.js';

const ajv = new Ajv2020({ allErrors: true, strict: false });
const validators = {
  compact: ajv.compile(compactLineJsonSchema()),
  error: ajv.compile(errorLineJsonSchema()),
  full: ajv.compile(resultJsonSchema()),
};
export const isPartEnd = ajv.compile(partEndJsonSchema());
export const isBatchLine = ajv.compile(batchLineJsonSchema());

/** Hands the line on if its JSON form keeps the contract; throws with every breach if not. */
export function checkedLine<Line extends CompactLine | FullLine | ErrorLine>(line: Line): Line {
  const validate = validators['error' in line ? 'error' : 'schema' in line ? 'full' : 'compact'];
  const plain: unknown = JSON.parse(JSON.stringify(line));
  if (!validate(plain)) throw new Error(`not a valid line: ${JSON.stringify(validate.errors, null, 1)}`);
  return line;
}

/** The lines of a document, each held against its schema. */
export const checkedLines = (text: string): (CompactLine | FullLine | ErrorLine)[] =>
  text
    .split('\n')
    .slice(0, -1)
    .map((line) => checkedLine(JSON.parse(line) as CompactLine | FullLine | ErrorLine));
