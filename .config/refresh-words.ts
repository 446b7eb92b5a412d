// npm run refresh:words - after a deliberate change of the sentence or the methods paragraph, gives the golden results the
// new words. Not a digit of theirs is touched: whether those still come out is for the tests to say.
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { methodsFor } from '../src/result/methods.js';
import { sentenceFor } from '../src/result/sentence.js';
import type { Result } from '../src/result/result.js';

const folder = new URL('../fixtures/golden/', import.meta.url);

for (const name of readdirSync(folder).filter((one) => one.endsWith('.json'))) {
  const file = new URL(name, folder);
  const result = JSON.parse(readFileSync(file, 'utf8')) as Result;
  const worded = { ...result, sentence: sentenceFor(result), methods: methodsFor(result) };
  writeFileSync(file, `${JSON.stringify(worded, null, 2)}\n`);
}
