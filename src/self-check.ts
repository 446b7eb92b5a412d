// Runs the shipped reference answers through the whole program, here and now, and holds what comes out against what is known.
import { createHash } from 'node:crypto';
import { analyse } from './analyse.js';
import type { Result } from './result/result.js';
import type { CheckedAnswer, CheckedCase, SelfCheck } from './result/self-check-declaration.js';
import { version } from './result/version.js';
import type { ReferenceAnswer, ReferenceCase, Step } from './self-check/reference-case.js';

/** What the program runs on, for the report. */
export type Machine = SelfCheck['machine'];

/** The cases that ship with the package. */
export async function shippedCases(): Promise<readonly ReferenceCase[]> {
  const { default: cases } = await import('./self-check/answers.json', { with: { type: 'json' } });
  return cases as unknown as readonly ReferenceCase[];
}

/**
 * Runs every case. A case that ends with a problem counts as differing and carries its message.
 * @param onProgress told after each case how many of all are done.
 */
export async function selfCheck(
  cases: readonly ReferenceCase[],
  machine: Machine,
  onProgress: (done: number, all: number) => void = () => undefined,
): Promise<SelfCheck> {
  const done: CheckedCase[] = [];
  for (const each of cases) {
    done.push(await checkCase(each));
    onProgress(done.length, cases.length);
  }
  const answers = done.flatMap((each) => each.answers);
  const differing = answers.filter(({ agrees }) => !agrees).length;
  return {
    schema: 'keepsum/selfcheck/1',
    tool: { name: 'keepsum', version },
    machine,
    answersSha256: createHash('sha256').update(JSON.stringify(cases)).digest('hex'),
    verdict: differing === 0 ? 'agrees' : 'differs',
    casesRun: done.length,
    answersCompared: answers.length,
    answersDiffering: differing,
    cases: done,
  };
}

async function checkCase({ id, title, source, origin, counts, strata, options, answers }: ReferenceCase) {
  const data = strata === undefined ? { counts: counts! } : { strata };
  const found = await analyse(data, options).catch((thrown: unknown) =>
    thrown instanceof Error ? thrown : new Error(String(thrown)),
  );
  const compared = answers.map((answer) => compare(answer, found));
  return {
    id,
    title,
    source,
    origin,
    statistic: typeof options.statistic === 'string' ? options.statistic : 'default',
    agrees: compared.every(({ agrees }) => agrees),
    answers: compared,
  };
}

function compare({ what, path, expected, tolerance }: ReferenceAnswer, found: Result | Error): CheckedAnswer {
  const obtained = found instanceof Error ? undefined : valueAt(found, path);
  const reason = found instanceof Error ? found.message : 'the result holds no such number';
  if (typeof obtained !== 'number') {
    const word = obtained === 'infinity' || obtained === '-infinity' ? obtained : null;
    return { what, expected, obtained: word, difference: null, tolerance, agrees: false, reason };
  }
  const apart = Math.abs(obtained - expected);
  const difference = expected === 0 ? apart : apart / Math.abs(expected);
  return { what, expected, obtained, difference, tolerance, agrees: difference <= tolerance };
}

/** Follows the steps into a result; undefined where one leads nowhere. */
export function valueAt(result: unknown, path: readonly Step[]): unknown {
  return path.reduce<unknown>((part, step) => {
    if (typeof part !== 'object' || part === null) return undefined;
    if (typeof step !== 'object') return (part as Record<string | number, unknown>)[step];
    if (!Array.isArray(part)) return undefined;
    return part.find((one: Record<string, unknown>) =>
      Object.entries(step).every(([key, value]) => one[key] === value),
    );
  }, result);
}
