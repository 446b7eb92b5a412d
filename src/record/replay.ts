// A result made again from what it records - counts, labels and wishes - and held against itself, digit by digit.
import { analyse, analyseGroups, answer } from '../analyse.js';
import { compactDeclaration } from '../batch/declaration.js';
import { compactLine, groupedLine } from '../batch/write-lines.js';
import type { PlanOptions } from '../plan/plan.js';
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import { resultDeclaration } from '../result/declaration.js';
import type { Result } from '../result/result.js';
import { version } from '../result/version.js';
import type { Surroundings } from '../sampled-answer.js';
import type { OwnStatistic } from '../statistic/own.js';
import { differencesBetween, type Difference } from './differences.js';
import { lineAgain, readAgain } from './read-again.js';

export interface ReplaySettings {
  /** The user's own statistic, where the record was made with one. */
  readonly own?: { readonly statistic: OwnStatistic; readonly statisticDigest: string };
  readonly surroundings?: Surroundings;
}

export interface Replayed {
  /** null for a whole result of one table. */
  readonly key: string | null;
  /** SHA-256 of the data that it came from, as recorded. */
  readonly sha256: string | null;
  readonly madeWith: string | null;
  readonly differences: readonly Difference[];
}

/** Words, and choices that a later version may make otherwise; compared only where the version is the same. */
const ofTheVersion = [
  'sentence',
  'methods',
  'notes',
  'diagnostics.cochranSentence',
  'plan.methodAsked',
  'plan.methodReason',
  'plan.forecast',
  'plan.asked',
] as const;

/**
 * Replays one record: a whole result (with or without a key), or a compact line.
 * @throws Problem: `not-a-record` (data), `own-statistic-needed` and `own-statistic-differs` (usage), and those of an analysis.
 */
export async function replay(record: unknown, place: string, settings: ReplaySettings = {}): Promise<Replayed> {
  const {
    key,
    family,
    shard: _,
    ...rest
  } = (typeof record === 'object' && record !== null ? record : {}) as Record<string, unknown>;
  if (rest['schema'] === 'keepsum/result/1') {
    const result = resultDeclaration.safeParse(rest);
    if (result.success) return replayResult(rest as Result, typeof key === 'string' ? key : null, settings);
    throw notARecord(place, result.error.issues[0]!);
  }
  if (rest['schema'] === 'keepsum/power/1' || rest['schema'] === 'keepsum/selfcheck/1')
    throw madeElsewhere(rest['schema'], place);
  const line = compactDeclaration.safeParse({
    ...(key === undefined ? {} : { key }),
    ...(family === undefined ? {} : { family }),
    ...rest,
  });
  if (line.success) return replayLine(line.data, settings);
  throw notARecord(place, line.error.issues[0]!);
}

async function replayResult(result: Result, key: string | null, settings: ReplaySettings): Promise<Replayed> {
  const { plan, tool } = result;
  const sameVersion = tool.version === version;
  const wishes: PlanOptions = {
    ...(plan.asked as PlanOptions | undefined),
    ...ownStatisticOf(plan.statistic, plan.statisticDigest, settings),
    ...(plan.tableKey === '' ? {} : { tableKey: plan.tableKey }),
    // A later version may foresee other work: the method that was used is used again.
    ...(sameVersion || plan.asked?.draws !== undefined ? {} : { method: plan.method }),
  };
  const obtained = await analyse(readAgain(result), wishes, settings.surroundings);
  const passOver = new Set(['tool.version', 'notes', ...(sameVersion ? [] : ofTheVersion)]);
  const differences = differencesBetween(result, JSON.parse(JSON.stringify(obtained)), passOver);
  return {
    key,
    sha256: result.input.sha256,
    madeWith: tool.version,
    differences: sameVersion ? [...differences, ...missingNotes(result, obtained)] : differences,
  };
}

/** Remarks on how a file was read cannot come again from counts; all others must. */
function missingNotes(recorded: Result, obtained: Result): Difference[] {
  const texts = new Set(recorded.notes.map((note) => JSON.stringify(note)));
  return obtained.notes.flatMap((note, k) =>
    texts.has(JSON.stringify(note)) ? [] : [{ field: `notes[${k}]`, recorded: undefined, obtained: note }],
  );
}

type Line = ReturnType<typeof compactDeclaration.parse>;

async function replayLine(line: Line, settings: ReplaySettings): Promise<Replayed> {
  const { key, family, plan } = line;
  const wishes = {
    ...plan,
    ...ownStatisticOf(plan.statistic ?? '', plan.statisticDigest, settings),
    tableKey: key,
  } as PlanOptions;
  const name = family === undefined ? { key } : { key, family };
  const { surroundings = {} } = settings;
  const read = lineAgain(line);
  let obtained: object;
  if (read.strata === undefined && read.clusters === undefined) {
    obtained = compactLine(name, await answer(read, wishes, surroundings), wishes);
  } else {
    const { result } = await analyseGroups(read, wishes, surroundings);
    obtained = groupedLine(name, read, result, wishes);
  }
  const differences = differencesBetween(line, JSON.parse(JSON.stringify(obtained)), new Set(['notes']));
  return { key, sha256: null, madeWith: null, differences };
}

function ownStatisticOf(name: string, digest: string | undefined, { own }: ReplaySettings): PlanOptions {
  if (digest === undefined) return {};
  if (own?.statisticDigest === digest) return { ...own };
  throw usageProblem({
    code: own === undefined ? 'own-statistic-needed' : 'own-statistic-differs',
    message:
      own === undefined
        ? `the record was made with a statistic of its user's own, "${name}"`
        : `the module given is not the one of the record, whose SHA-256 is ${digest}`,
    place: '--statistic',
    hint: 'name the very module with --statistic ./FILE.mjs',
  });
}

const madeElsewhere = (schema: string, place: string): Problem =>
  dataProblem({
    code: 'not-a-record',
    message:
      schema === 'keepsum/power/1'
        ? 'this is the record of a planned study, which holds no counts to replay'
        : 'this is the record of a self check, not of a table',
    place,
    hint:
      schema === 'keepsum/power/1'
        ? 'run keepsum power with the groups, sizes and seed in it and compare'
        : 'run keepsum selfcheck again and compare',
  });

const notARecord = (place: string, { path, message }: { path: PropertyKey[]; message: string }): Problem =>
  dataProblem({
    code: 'not-a-record',
    message: `this is no result of keepsum that can be replayed${path.length === 0 ? '' : ` (${path.map(String).join('.')}: ${message})`}`,
    place,
    hint: 'give what --format json, keepsum batch or --format html wrote, unchanged',
  });
