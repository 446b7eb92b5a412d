// Every result a test receives is held against the published schema, by a validator that knows nothing of our code.
import { Ajv2020 } from 'ajv/dist/2020.js';
import { resultJsonSchema } from '../../src/result/schema.js';
import type { Result } from '../../src/result/result.js';

const validate = new Ajv2020({ allErrors: true, strict: false }).compile(resultJsonSchema());

/** Hands the result on if its JSON form keeps the contract; throws with every breach if not. */
export function checked(result: Result): Result {
  const plain: unknown = JSON.parse(JSON.stringify(result));
  if (!validate(plain)) throw new Error(`not a valid result: ${JSON.stringify(validate.errors, null, 1)}`);
  return result;
}
