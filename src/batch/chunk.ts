// Tables of a batch on their way: some of them in a row, answered together, here or on a thread.
import type { Surroundings } from '../sampled-answer.js';
import {
  answerItem,
  answerLine,
  answerObject,
  type BatchSettings,
  type Outcome,
  type TableItem,
} from './answer-table.js';
import { csvText, lineOf, ndjsonText, type OutputLine } from './write-lines.js';

/** Units in a row: lines as text (blank ones too, they count), objects of a program, or tables already read. */
export type Chunk =
  | { readonly kind: 'lines'; readonly lines: readonly string[]; readonly first: number }
  | { readonly kind: 'objects'; readonly objects: readonly unknown[]; readonly first: number }
  | { readonly kind: 'tables'; readonly tables: readonly TableItem[] };

/** Where units come from, in order. */
export interface UnitSource {
  /** At most so many, as soon as there is one; null at the end. @throws Problem when the source cannot be read on. */
  next(most: number): Promise<Chunk | null>;
}

export const styles = ['ndjson', 'csv', 'raw-csv', 'objects'] as const;
export type Style = (typeof styles)[number];

/** Plain data, so that it can be sent to a thread. */
export interface ChunkTask {
  readonly chunk: Chunk;
  readonly settings: BatchSettings;
  readonly style: Style;
}

export interface ChunkDone {
  /** Lines of output; empty for objects. */
  readonly text: string;
  readonly objects: readonly OutputLine[];
  readonly tables: number;
  /** Those of them that could not be used. */
  readonly faults: number;
  /** Forecast of the work it was, in milliseconds of a usual machine; counted, so that it is the same everywhere. */
  readonly work: number;
}

export const unitsIn = (chunk: Chunk): number =>
  chunk.kind === 'lines' ? chunk.lines.length : chunk.kind === 'objects' ? chunk.objects.length : chunk.tables.length;

/** Units as text, the same wherever chunks begin and end. */
export function textOf(chunk: Chunk): string {
  switch (chunk.kind) {
    case 'lines':
      return `${chunk.lines.join('\n')}\n`;
    case 'objects':
      return chunk.objects.map((object) => `${JSON.stringify(object)}\n`).join('');
    case 'tables':
      return chunk.tables.map((table) => `${JSON.stringify(table)}\n`).join('');
  }
}

export async function answerChunk(task: ChunkTask, surroundings: Surroundings): Promise<ChunkDone> {
  const { settings, style } = task;
  const objects: OutputLine[] = [];
  let text = '';
  let tables = 0;
  let faults = 0;
  let work = 0;
  for (const outcome of outcomes(task.chunk, settings, surroundings)) {
    const found = await outcome;
    tables++;
    if (found.kind === 'error') faults++;
    work += workOf(found);
    if (style === 'objects') objects.push(lineOf(found));
    else text += style === 'ndjson' ? stamped(ndjsonText(found), settings.shard) : csvText(found, style === 'raw-csv');
  }
  return { text, objects, tables, faults, work };
}

/** The part of a batch that a line belongs to stands behind its key. */
const stamped = (line: string, shard: string | undefined): string =>
  shard === undefined ? line : line.replace(/^\{"key":"(?:[^"\\]|\\.)*"/, (start) => `${start},"shard":"${shard}"`);

/** One promise a table, each made when the one before it has been awaited. */
function* outcomes(chunk: Chunk, settings: BatchSettings, surroundings: Surroundings): Generator<Promise<Outcome>> {
  switch (chunk.kind) {
    case 'lines':
      for (const [k, line] of chunk.lines.entries()) {
        if (line.trim() !== '') yield answerLine(line, chunk.first + k, settings, surroundings);
      }
      break;
    case 'objects':
      for (const [k, object] of chunk.objects.entries()) {
        const number = chunk.first + k;
        yield answerObject(object, number, `table ${number}`, settings, surroundings);
      }
      break;
    case 'tables':
      for (const item of chunk.tables) yield answerItem(item, settings, surroundings);
  }
}

const perTable = 0.05;
const perDraw = 4e-4;

function workOf(outcome: Outcome): number {
  if (outcome.kind === 'error') return perTable;
  const { plan, pValues } =
    outcome.kind === 'compact'
      ? { plan: outcome.answer.prepared.plan, pValues: outcome.answer.pValues }
      : outcome.result;
  if (plan.method === 'exact') return perTable + plan.forecast.seconds * 1000;
  const drawn = pValues[0]!.errors.find(({ kind }) => kind === 'sampling' || kind === 'sequential');
  return perTable + (drawn !== undefined && 'draws' in drawn ? drawn.draws * perDraw : 0);
}
