// A parametric bootstrap p for a table of which only the total was fixed: tables of that total drawn with the cell
// probabilities fitted under independence (Davison & Hinkley 1997, ch. 4), each valued with its own margins. An
// approximation: the fitted probabilities stand for the unknown ones.
import { MultinomialDrawer } from '../null/unconditional/multinomial-draws.js';
import { blockSize } from '../null/sampled/limits.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry, Question } from '../pvalue/contract.js';
import { sampledPValue, sampledDoubled } from '../pvalue/from-sampled.js';
import { blockStream } from '../random/stream.js';
import type { Choices, Roles, Statistic } from '../statistic/contract.js';
import type { SampledCut, OrderingName } from '../null/contract.js';
import { hasOneTableOnly, liveTable, type LiveTable } from '../table/live-table.js';
import type { Table } from '../table/table.js';

/** Values this near in relative terms count as tied: drawn tables are valued in doubles. */
export const bootstrapTie = 1e-9;

export interface BootstrapParts {
  readonly table: Table;
  readonly live: LiveTable;
  readonly statistic: Statistic;
  readonly roles: Roles;
  readonly choices: Choices;
  readonly plan: Plan;
  readonly onProgress?: (draws: number, most: number) => void;
}

/** One entry for each question, all from the same draws; a function of table, plan and seed alone. */
export async function bootstrapEntries(questions: readonly Question[], parts: BootstrapParts): Promise<PValueEntry[]> {
  const { plan } = parts;
  const draws = plan.draws as number;
  const counted = await countDraws(parts, draws);
  const cut = (ordering: OrderingName): SampledCut => {
    const [below, tied, above] = counted[ordering as keyof typeof counted];
    return { kind: 'sampled', ordering, below: below!, tied: tied!, above: above!, draws };
  };
  const confidence = plan.samplingConfidence;
  return Promise.all(
    questions.map(async (question) => {
      const entry =
        question.rule === 'doubled'
          ? await sampledDoubled(question, cut('upper'), cut('lower'), confidence)
          : await sampledPValue(question, cut(question.tail === 'both' ? 'distance' : question.tail), confidence);
      return { ...entry, guaranteed: false, errors: [...entry.errors, { kind: 'approximation' as const }] };
    }),
  );
}

type Tally = [below: number, tied: number, above: number];

async function countDraws(
  parts: BootstrapParts,
  draws: number,
): Promise<Record<'upper' | 'lower' | 'distance', Tally>> {
  const { live, plan } = parts;
  const { rows, columns, rowTotals, columnTotals, total } = live;
  const fitted = Float64Array.from(
    { length: rows * columns },
    (_, cell) => (rowTotals[Math.floor(cell / columns)]! / total) * (columnTotals[cell % columns]! / total),
  );
  const drawer = new MultinomialDrawer(total, fitted);
  const valueOf = valuer(parts);
  const observed = valueOf(live.counts);
  const drawn = new Float64Array(rows * columns);
  const upper: Tally = [0, 0, 0];
  const distance: Tally = [0, 0, 0];
  for (let done = 0, block = 0; done < draws; block++) {
    const stream = blockStream(plan.seed!, plan.tableKey, block);
    const end = Math.min(draws, done + blockSize);
    for (; done < end; done++) {
      drawer.draw(stream, drawn);
      const value = valueOf(drawn);
      upper[1 + place(value, observed)]!++;
      distance[1 + place(Math.abs(value), Math.abs(observed))]!++;
    }
    if (block % 8 === 7) {
      parts.onProgress?.(done, draws);
      await new Promise((resolve) => setImmediate(resolve));
    }
  }
  return { upper, lower: [upper[2], upper[1], upper[0]], distance };
}

function place(value: number, observed: number): -1 | 0 | 1 {
  if (value === observed) return 0;
  const apart = value - observed;
  if (Math.abs(apart) <= bootstrapTie * Math.max(Math.abs(value), Math.abs(observed))) return 0;
  return apart > 0 ? 1 : -1;
}

/** The statistic of any counts, with their own margins; 0 where a drawn table has one live line only. */
function valuer({ live, statistic, roles, choices }: BootstrapParts): (counts: Float64Array) => number {
  return (counts) => {
    const sub = subTable(live, counts);
    if (hasOneTableOnly(sub)) return 0;
    const { rowIndex, columnIndex } = sub;
    const bound = statistic.bind(sub, roles, {
      ...choices,
      ...(choices.rowScores === undefined ? {} : { rowScores: rowIndex.map((i) => choices.rowScores![i]!) }),
      ...(choices.columnScores === undefined
        ? {}
        : { columnScores: columnIndex.map((j) => choices.columnScores![j]!) }),
    });
    return bound.standardised?.[0]?.value ?? bound.value(sub.counts);
  };
}

/** The live part of drawn counts. */
function subTable({ rows, columns }: LiveTable, counts: Float64Array): LiveTable {
  const lines = Array.from({ length: rows }, (_, i) => Array.from(counts.subarray(i * columns, (i + 1) * columns)));
  const rowTotals = lines.map((line) => line.reduce((a, b) => a + b, 0));
  const columnTotals = lines[0]!.map((_, j) => lines.reduce((sum, line) => sum + line[j]!, 0));
  const labels: string[] = [];
  return liveTable({
    counts: lines,
    rowLabels: labels,
    columnLabels: labels,
    rowTotals,
    columnTotals,
    total: rowTotals.reduce((a, b) => a + b, 0),
  });
}
