// The library's way through many tables: an async generator over what `keepsum batch` writes line by line.
import { availableParallelism } from 'node:os';
import { freshSeed } from '../plan/fresh-seed.js';
import type { PlanOptions } from '../plan/plan.js';
import { unused } from '../plan/settings.js';
import type { BatchLine, CompactLine, ErrorLine, FullLine } from './lines.js';
import { answerInOrder } from './in-order.js';
import { objectSource } from './object-source.js';

export interface ManyOptions {
  /** Whole results instead of compact lines. */
  readonly full?: boolean;
  /** Worker threads for long work, from 1; default: as many as the machine runs at once. Changes no digit. */
  readonly threads?: number;
}

type Tables = Iterable<BatchLine> | AsyncIterable<BatchLine>;

/**
 * Answers many tables, in their order, reading no further ahead than it works: memory does not grow with their number.
 * Each table's draws are keyed by the seed and the table's `key` (without one: its number from 1), so that neither order nor
 * subset nor threads change a digit; equal keys share a stream. A table that cannot be used gives an object with `error` (code,
 * message, place, hint) in its turn, and the others go on.
 * @param tables what lines of `keepsum batch` hold: counts, perhaps a key, labels and options of their own.
 * @param plan options of every table; those of a table go over them. Without a seed one is made, and given with every sampled p.
 * @throws what `tables` itself throws, after what came before it has been handed on; Problem (usage) for `shard` in the plan.
 */
export function analyseMany(
  tables: Tables,
  plan: PlanOptions,
  options: ManyOptions & { readonly full: true },
): AsyncGenerator<FullLine | ErrorLine, void>;
export function analyseMany(
  tables: Tables,
  plan?: PlanOptions,
  options?: ManyOptions & { readonly full?: false },
): AsyncGenerator<CompactLine | ErrorLine, void>;
export async function* analyseMany(
  tables: Tables,
  plan: PlanOptions = {},
  { full = false, threads = availableParallelism() }: ManyOptions = {},
): AsyncGenerator<CompactLine | FullLine | ErrorLine, void> {
  if (plan.shard !== undefined) throw unused('shard', 'on many tables', 'hand over those of one part only');
  const settings = { wishes: { ...plan, seed: plan.seed ?? freshSeed() }, full, sourceName: '' };
  for await (const { objects } of answerInOrder({
    source: objectSource(tables),
    threads,
    settings,
    style: 'objects',
  })) {
    yield* objects;
  }
}
