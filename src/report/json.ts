// The result itself, all digits, as JSON. What JSON cannot hold must not slip through as null.
import { shownJson } from '../result/label-words.js';
import type { Format } from './format.js';

export const json: Format = {
  words: 'everything, all digits, for programs (keepsum schema result describes it)',
  write(result) {
    checkFinite(result, 'result');
    return shownJson(`${JSON.stringify(result, null, 2)}\n`);
  },
};

/** @throws TypeError at the first number that JSON would turn into null: a fault of ours, never of the data. */
function checkFinite(value: unknown, path: string): void {
  if (typeof value === 'number' && !Number.isFinite(value)) throw new TypeError(`${path} is ${value}`);
  if (typeof value !== 'object' || value === null) return;
  for (const [key, part] of Object.entries(value)) checkFinite(part, `${path}.${key}`);
}
