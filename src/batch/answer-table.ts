// One table of a batch, from a line, an object or a file that was read, to its answer - or to what is wrong with it, so that the
// other tables go on.
import { analyse, analyseGroups, answer, type Answer } from '../analyse.js';
import { notUtf8 } from '../input/file-text.js';
import type { StrataParts } from '../input/strata.js';
import type { ReadTable } from '../input/read-table.js';
import type { PlanOptions } from '../plan/plan.js';
import { Problem, type ProblemParts } from '../problem/problem.js';
import type { Result } from '../result/result.js';
import type { Surroundings } from '../sampled-answer.js';
import type { TableParts } from '../table/table.js';
import { lineDeclaration } from './declaration.js';
import { misfit, noKey, notJson, notOneTable } from './line-problems.js';
import type { BatchLine } from './lines.js';

/** How every table of a run is treated; plain data, so that it can be sent to a thread. */
export interface BatchSettings {
  /** Of all tables; a line's own go over them. With a seed, so that all tables share one. */
  readonly wishes: PlanOptions & { readonly seed: string };
  /** Whole results instead of compact lines. */
  readonly full: boolean;
  /** Of a batch's part, as its lines are stamped: "3/16". */
  readonly shard?: string;
  /** Lines and objects without a key cannot be used. */
  readonly requireKeys?: boolean;
  /** How places name the input: a file, `standard input`; for objects, nothing. */
  readonly sourceName: string;
}

/** A table to be answered: counts from a line or a program, or a table that an input function read. */
interface Asked {
  readonly data: TableParts | StrataParts | ReadTable;
  readonly wishes: PlanOptions;
  /** The family that it is adjusted in, if it names one. */
  readonly family?: string | undefined;
}

interface Named {
  readonly key: string;
  readonly family?: string | undefined;
}

export type Outcome = Named &
  (
    | { readonly kind: 'compact'; readonly answer: Answer; readonly wishes: PlanOptions }
    | { readonly kind: 'grouped'; readonly read: ReadTable; readonly result: Result; readonly wishes: PlanOptions }
    | { readonly kind: 'full'; readonly result: Result }
    | { readonly kind: 'error'; readonly error: Readonly<Required<ProblemParts>> }
  );

/** A table, or what kept it from being read, under its key; `place` is what it was read from. */
export type TableItem = Named &
  ({ readonly read: ReadTable; readonly place: string } | { readonly error: Required<ProblemParts> });

/** @param number of the line, from 1: names the table where no key is given. */
export function answerLine(
  text: string,
  number: number,
  settings: BatchSettings,
  surroundings: Surroundings,
): Promise<Outcome> {
  let value: unknown;
  const place = `${settings.sourceName}:${number}`;
  try {
    value = JSON.parse(text);
  } catch (thrown) {
    const problem = text.includes('\ufffd') ? notUtf8(place) : notJson(place, text, (thrown as SyntaxError).message);
    return Promise.resolve(refused(keyInText(text) ?? String(number), problem, place));
  }
  if (text.includes('\ufffd')) return Promise.resolve(refused(keyIn(value) ?? String(number), notUtf8(place), place));
  return answerObject(value, number, place, settings, surroundings);
}

/** An object as a line would hold it. */
export async function answerObject(
  value: unknown,
  number: number,
  place: string,
  settings: BatchSettings,
  surroundings: Surroundings,
): Promise<Outcome> {
  const line = lineDeclaration.safeParse(value);
  if (!line.success) return refused(keyIn(value) ?? String(number), misfit(value, line.error.issues), place);
  const { key = number, family, plan, ...parts } = line.data;
  if (settings.requireKeys && line.data.key === undefined) return refused(String(number), noKey(), place);
  if ((parts.counts === undefined) === (parts.strata === undefined))
    return refused(String(key), notOneTable(parts), place);
  const wishes = plan === undefined ? settings.wishes : { ...settings.wishes, ...plan };
  return settle(
    String(key),
    { data: partsIn(parts), wishes: wishes as PlanOptions, family },
    place,
    settings,
    surroundings,
  );
}

export async function answerItem(
  item: TableItem,
  settings: BatchSettings,
  surroundings: Surroundings,
): Promise<Outcome> {
  if ('error' in item) return { key: item.key, kind: 'error', error: item.error };
  const { key, read: data, family } = item;
  return settle(key, { data, wishes: settings.wishes, family }, item.place, settings, surroundings);
}

/** Strata without labels are numbered. */
function partsIn({ strata, ...parts }: Omit<BatchLine, 'key' | 'family' | 'plan'>): TableParts | StrataParts {
  if (strata === undefined) return parts as TableParts;
  return {
    ...parts,
    strata: strata.map(({ label, counts }, k) => ({ label: label ?? `stratum ${k + 1}`, counts })),
  } as StrataParts;
}

async function settle(
  key: string,
  { data, wishes, family }: Asked,
  place: string,
  { full }: BatchSettings,
  surroundings: Surroundings,
): Promise<Outcome> {
  const ofTable = { ...wishes, tableKey: key };
  try {
    if (full) return { key, family, kind: 'full', result: await analyse(data, ofTable, surroundings) };
    if ('strata' in data || 'clusters' in data) {
      const { read, result } = await analyseGroups(data, ofTable, surroundings);
      return { key, family, kind: 'grouped', read, result, wishes };
    }
    return { key, family, kind: 'compact', answer: await answer(data, ofTable, surroundings), wishes };
  } catch (thrown) {
    if (!(thrown instanceof Problem)) throw thrown;
    return refused(key, thrown, place);
  }
}

export const refused = (key: string, problem: Problem, place: string): Outcome => ({
  key,
  kind: 'error',
  error: errorOf(problem, place),
});

/** @param place of the table; where in it the problem lies follows. */
export function errorOf({ code, message, hint, place: inside }: Problem, place: string): Required<ProblemParts> {
  if (inside === undefined || inside === place) return { code, message, place, hint };
  return { code, message, place: inside.startsWith(`${place}:`) ? inside : `${place}, ${inside}`, hint };
}

/** Of a line that is no JSON, where it begins with one that is. */
function keyInText(text: string): string | undefined {
  const [, key] = /^\s*\{\s*"key"\s*:\s*("(?:[^"\\]|\\.)*"|\d{1,15})\s*[,}]/.exec(text) ?? [];
  try {
    return key === undefined ? undefined : String(JSON.parse(key));
  } catch {
    return undefined;
  }
}

function keyIn(value: unknown): string | undefined {
  const key = typeof value === 'object' && value !== null ? (value as { key?: unknown }).key : undefined;
  return typeof key === 'string' || Number.isSafeInteger(key) ? String(key) : undefined;
}
