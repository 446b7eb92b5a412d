// What a result tells of its strata: the tables, each with its own odds ratio where there is one, and the pooled answer to compare with.
import { extended, type Extended } from '../effect/contract.js';
import { zOfConfidence } from '../numeric/normal-quantile.js';
import type { StratumTable } from '../input/read-table.js';
import type { Question } from '../pvalue/contract.js';
import type { StrataFamily } from './family.js';
import { oddsRatio } from './odds/mantel-haenszel.js';
import type { Stratum } from './odds/stratum.js';

export interface StrataFound {
  /** The column or the name that tells the strata apart; null where there is none. */
  from: string | null;
  labels: string[];
  /** tables[stratum][row][column], over the lines of the pooled table. */
  tables: number[][][];
  totals: number[];
  /** False where the margins of a stratum leave one table only: it says nothing. */
  decides: boolean[];
  /** 2x2: a d / (b c) of each stratum, null where it has no value; of the pooled table; and of Mantel & Haenszel over strata. */
  oddsRatios?: (Extended | null)[];
  /** Woolf (1955); null where a cell is empty. */
  oddsRatioIntervals?: ([number, number] | null)[];
  pooledOddsRatio?: Extended | null;
  commonOddsRatio?: Extended | null;
  /** The statistic of the pooled table taken as one stratum, and its asymptotic p; null where it has none. */
  pooled: { value: number; p: number | null };
}

export function strataFound(
  from: string | null,
  strata: readonly StratumTable[],
  twoByTwos: readonly Stratum[] | null,
  pooledFamily: StrataFamily,
  pooledStratum: Stratum | null,
  question: Question,
  confidence: number,
): StrataFound {
  const [asymptotic] = pooledFamily.approximations(question);
  return {
    from,
    labels: strata.map(({ label }) => label),
    tables: strata.map(({ counts }) => counts.map((row) => [...row])),
    totals: strata.map(({ counts }) => counts.flat().reduce((sum, n) => sum + n, 0)),
    decides: strata.map(({ counts }) => decides(counts)),
    ...(twoByTwos === null || pooledStratum === null
      ? {}
      : {
          oddsRatios: twoByTwos.map((one) => shown(oddsRatio([one]))),
          oddsRatioIntervals: twoByTwos.map((one) => woolf(one, confidence)),
          pooledOddsRatio: shown(oddsRatio([pooledStratum])),
          commonOddsRatio: shown(oddsRatio(twoByTwos)),
        }),
    pooled: { value: pooledFamily.value, p: asymptotic?.p ?? null },
  };
}

/** exp(ln OR +- z sqrt(1/a + 1/b + 1/c + 1/d)). */
function woolf({ a, b, c, d }: Stratum, confidence: number): [number, number] | null {
  if (a === 0 || b === 0 || c === 0 || d === 0) return null;
  const centre = Math.log(a / b) + Math.log(d / c);
  const half = zOfConfidence(confidence) * Math.sqrt(1 / a + 1 / b + 1 / c + 1 / d);
  return [Math.exp(centre - half), Math.exp(centre + half)];
}

const shown = (value: number | null): Extended | null => (value === null ? null : extended(value));

const decides = (counts: readonly (readonly number[])[]): boolean => {
  const rows = counts.filter((row) => row.some((n) => n > 0)).length;
  const columns = (counts[0] ?? []).filter((_, j) => counts.some((row) => row[j]! > 0)).length;
  return rows > 1 && columns > 1;
};
