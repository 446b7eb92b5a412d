// A statistic of the user's own from a module named by --statistic: its bytes are digested for the record, then it is run.
import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { usageProblem } from '../../problem/problem.js';
import type { OwnStatistic } from '../../statistic/own.js';

export interface LoadedStatistic {
  /** The default export, checked by the plan. */
  readonly statistic: OwnStatistic;
  /** SHA-256 of the bytes of the module itself (not of what it imports). */
  readonly statisticDigest: string;
}

/** @throws Problem (usage) `no-module`, `module-failed`, `no-default-export`; what is exported is checked by the plan. */
export async function loadStatistic(path: string): Promise<LoadedStatistic> {
  const file = resolve(path);
  let bytes: Uint8Array;
  try {
    bytes = await readFile(file);
  } catch (thrown) {
    throw usageProblem({
      code: 'no-module',
      message: `the module "${path}" cannot be read (${reasonOf(thrown)})`,
      place: '--statistic',
      hint: 'give the path of a file such as ./mine.mjs, or the name of a statistic',
    });
  }
  let exports: { default?: unknown };
  try {
    exports = await orNever(import(/* @vite-ignore */ pathToFileURL(file).href) as Promise<{ default?: unknown }>);
  } catch (thrown) {
    throw usageProblem({
      code: 'module-failed',
      message: `the module "${path}" could not be run: ${reasonOf(thrown)}`,
      place: '--statistic',
      hint: 'it must be a JavaScript module; node runs it, so try it with node first',
    });
  }
  // A text would be taken for the name of a built-in statistic.
  if (exports.default === undefined || typeof exports.default === 'string') {
    throw usageProblem({
      code: 'no-default-export',
      message: `the module "${path}" has no default export${exports.default === undefined ? '' : ' but a text'}`,
      place: '--statistic',
      hint: "export default { name: 'mine', sided: 'upper', words: 'my statistic', value: (counts, margins) => ... }",
    });
  }
  return {
    statistic: exports.default as OwnStatistic,
    statisticDigest: createHash('sha256').update(bytes).digest('hex'),
  };
}

/** A module that waits for something which never comes would end the process without a word. */
async function orNever<T>(loading: Promise<T>): Promise<T> {
  let ends: () => void;
  const never = new Promise<T>((_, fail) => {
    ends = () => fail(new Error('it waits for something that never comes'));
    process.once('beforeExit', ends);
  });
  return Promise.race([loading, never]).finally(() => process.off('beforeExit', ends));
}

/** Codes of node for modules say less than its words; codes of the system say it in short. */
function reasonOf(thrown: unknown): string {
  if (!(thrown instanceof Error)) return String(thrown);
  const { code } = thrown as NodeJS.ErrnoException;
  return code === undefined || code.startsWith('ERR_') ? thrown.message.split('\n')[0]! : code;
}
