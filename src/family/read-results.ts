// Lines of results (compact, whole or error lines) to the members of families.
import { dataProblem } from '../problem/problem.js';

/** What a family needs of a result. */
export interface FoundTest {
  readonly key: string;
  readonly family: string;
  /** null below the smallest double. */
  readonly p: number | null;
  readonly leastAttainable: number | null;
  readonly method: string;
  /** Of lines that hold them: what the least attainable p can be worked out from. */
  readonly table?: LabelledCounts;
  readonly wishes?: object;
}

export interface LabelledCounts {
  readonly counts: readonly (readonly number[])[];
  readonly rowLabels?: readonly string[];
  readonly columnLabels?: readonly string[];
}

export interface FailedTest {
  readonly key: string;
  readonly code: string;
}

interface ResultLine {
  readonly key?: unknown;
  readonly family?: unknown;
  readonly error?: { readonly code?: unknown };
  readonly plan?: { readonly tableKey?: unknown; readonly asked?: unknown; readonly statistic?: unknown };
  readonly counts?: unknown;
  readonly input?: object;
  readonly schema?: unknown;
  readonly strata?: unknown;
  readonly clusters?: unknown;
  readonly impossible?: unknown;
  readonly pValues?: readonly {
    readonly p?: unknown;
    readonly log10P?: unknown;
    readonly leastAttainable?: unknown;
    readonly method?: unknown;
  }[];
}

/** The family of lines that name none. */
export const onlyFamily = 'all';

/**
 * The headline of each result counts, once. Lines without a key take the number of their line.
 * @throws Problem (data): `not-json`, `not-a-result`, with the place.
 */
export function readResultLine(text: string, place: string, number: number): FoundTest | FailedTest {
  let line: ResultLine;
  try {
    line = JSON.parse(text) as ResultLine;
  } catch {
    throw dataProblem({
      code: 'not-json',
      message: 'this line is not JSON',
      place,
      hint: 'give the output of keepsum batch, or of keepsum test --format ndjson, one result a line',
    });
  }
  const key = String(line?.key ?? (line?.plan?.tableKey || number));
  if (typeof line?.error?.code === 'string') return { key, code: line.error.code };
  const headline = line?.pValues?.[0];
  const isP = (value: unknown): value is number => typeof value === 'number' && value >= 0 && value <= 1;
  const tiny = headline?.p === null && typeof headline.log10P === 'number';
  if (headline === undefined || !(isP(headline.p) || tiny)) {
    throw dataProblem({
      code: 'not-a-result',
      message: 'this line holds no result of keepsum',
      place,
      hint: 'give the output of keepsum batch, or of keepsum test --format ndjson, one result a line',
    });
  }
  return {
    key,
    family: typeof line.family === 'string' ? line.family : onlyFamily,
    p: isP(headline.p) ? headline.p : null,
    leastAttainable: isP(headline.leastAttainable) ? headline.leastAttainable : null,
    method: String(headline.method),
    ...originOf(line),
  };
}

/** Nothing for tables with strata or clusters: their margins do not tell what they could attain. */
function originOf(line: ResultLine): Pick<FoundTest, 'table' | 'wishes'> {
  if (line.strata !== undefined || line.clusters !== undefined || line.impossible !== undefined) return {};
  const whole = line.schema === 'keepsum/result/1';
  const { counts, rowLabels, columnLabels } = ((whole ? line.input : line) ?? {}) as Partial<LabelledCounts>;
  const wishes = whole ? line.plan?.asked : line.plan;
  if (!Array.isArray(counts) || typeof wishes !== 'object' || wishes === null) return {};
  return { table: { counts, ...(rowLabels && { rowLabels }), ...(columnLabels && { columnLabels }) }, wishes };
}
