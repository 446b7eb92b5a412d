// Parts of one run pooled: the same counts, plan and seed, every part once, and the result is that of the whole run, made as if
// one machine had drawn it all.
import { analyse } from '../analyse.js';
import type { PlanOptions } from '../plan/plan.js';
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import { resultDeclaration } from '../result/declaration.js';
import type { Result } from '../result/result.js';
import { differencesBetween } from './differences.js';
import { readAgain } from './read-again.js';

export interface Part {
  readonly place: string;
  readonly value: unknown;
}

/** @throws Problem: data for what is no part, usage for parts that do not belong together, overlap or leave gaps. */
export async function mergeParts(parts: readonly Part[]): Promise<Result> {
  const results = parts.map(({ place, value }) => ({ place, result: partIn(value, place) }));
  const [first] = results;
  if (first === undefined) throw missing('no parts are named', 'name all parts of the run: keepsum merge part-*.json');
  for (const other of results.slice(1)) refuseOther(first, other);
  refuseGaps(results);
  const { plan } = first.result;
  const tallies = first.result.part!.tallies.map((_, k) =>
    ([0, 1, 2] as const).map((side) => results.reduce((sum, { result }) => sum + result.part!.tallies[k]![side], 0)),
  ) as [number, number, number][];
  const draws = results.reduce((sum, { result }) => sum + result.part!.draws, 0);
  const { shard: _, ...asked } = (plan.asked ?? {}) as PlanOptions;
  return analyse(
    readAgain(first.result),
    { ...asked, ...(plan.tableKey === '' ? {} : { tableKey: plan.tableKey }) },
    { pooled: { statistic: plan.statistic, tableKey: plan.tableKey, tallies, draws } },
  );
}

function partIn(value: unknown, place: string): Result {
  const parsed = resultDeclaration.safeParse(value);
  if (!parsed.success) {
    throw dataProblem({
      code: 'not-a-record',
      message: 'this is no result of keepsum',
      place,
      hint: 'give what --shard with --format json wrote, unchanged',
    });
  }
  const result = value as Result;
  if (result.part !== undefined && result.plan.shard !== undefined) return result;
  throw dataProblem({
    code: 'not-a-part',
    message: 'this result is whole, no part of a run',
    place,
    hint: 'parts are made with --shard 1/16, --shard 2/16 and so on',
  });
}

/** All that must be the same in every part. */
const common = ({ input, plan: { shard, asked, ...plan }, statistic, tool }: Result): unknown => {
  const { shard: _, ...wishes } = (asked ?? {}) as Record<string, unknown>;
  return { input, plan: { ...plan, of: shard!.of, asked: wishes }, statistic, tool };
};

function refuseOther(
  first: { readonly place: string; readonly result: Result },
  other: { readonly place: string; readonly result: Result },
): void {
  const [difference] = differencesBetween(common(first.result), common(other.result));
  if (difference === undefined) return;
  throw usageProblem({
    code: 'parts-differ',
    message: `this is a part of another run than ${first.place}: ${difference.field} is not the same`,
    place: other.place,
    hint: 'parts need the same counts, options, seed, number of draws and version',
  });
}

function refuseGaps(results: readonly { readonly place: string; readonly result: Result }[]): void {
  const { of } = results[0]!.result.plan.shard!;
  const seen = new Map<number, string>();
  for (const { place, result } of results) {
    const { index } = result.plan.shard!;
    const before = seen.get(index);
    if (before !== undefined) {
      throw usageProblem({
        code: 'part-twice',
        message: `part ${index} of ${of} is there twice, also as ${before}`,
        place,
        hint: 'name every part once',
      });
    }
    seen.set(index, place);
  }
  const gaps = Array.from({ length: of }, (_, k) => k + 1).filter((index) => !seen.has(index));
  if (gaps.length > 0) {
    throw missing(
      `${gaps.length === 1 ? 'part' : 'parts'} ${gaps.slice(0, 10).join(', ')}${gaps.length > 10 ? ' and more' : ''} of ${of} ${gaps.length === 1 ? 'is' : 'are'} missing`,
      'run what is missing with --shard, then name all parts',
    );
  }
}

const missing = (message: string, hint: string): Problem => usageProblem({ code: 'parts-missing', message, hint });
