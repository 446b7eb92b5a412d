// The plan: everything a run will do, checked and frozen before work starts, echoed whole in the result.
import type { OrderingName } from '../null/contract.js';
import type { PlannedForecast } from '../null/forecast.js';
import type { FixedSide, OutcomeOrder } from './design.js';
import type { StatedValue } from './null-value.js';
import type { OwnStatistic } from '../statistic/own.js';
import type { ScoreWish } from './scores.js';

export const tails = ['upper', 'lower', 'both'] as const;
export type Tail = (typeof tails)[number];

export const twoSidedRules = ['distance', 'probability', 'doubled', 'blaker'] as const;
export type TwoSidedRule = (typeof twoSidedRules)[number];

export const methods = ['auto', 'exact', 'sample', 'asymptotic'] as const;
export type Method = (typeof methods)[number];
export type ChosenMethod = Exclude<Method, 'auto'>;

/** What a user may say; everything is optional. Names as on the command line, in camel case. */
export interface PlanOptions {
  /** The name of a built-in one, or one of your own. */
  readonly statistic?: string | OwnStatistic;
  /** SHA-256 of the module that a statistic of your own came from, 64 hexadecimal digits; kept in the plan. */
  readonly statisticDigest?: string;
  /** Rows and columns are two answers of the same units, with the same levels: tests of change, and of agreement. */
  readonly paired?: boolean;
  readonly tail?: Tail;
  readonly twoSidedRule?: TwoSidedRule;
  readonly groups?: 'rows' | 'columns';
  /** Label of the level counted as the event (default: first level of the side that is not groups). */
  readonly event?: string;
  /** Label of the second group, the one compared with (default: the second listed). */
  readonly reference?: string;
  /** For trend: one score for each row of the table, or `midranks`. Default 1, 2, 3, ... Over strata: `midranks` (within each, the
   *  default), `pooled-midranks`, or one for each row. */
  readonly rowScores?: ScoreWish;
  readonly columnScores?: ScoreWish;
  /** For power-divergence: above -1, a decimal or a fraction such as 2/3 (the default), read as the rational it is. */
  readonly lambda?: string | number;
  /** Sides whose lines stand in order: adds the questions that use it, and measures of association for ordered sides. */
  readonly ordered?: 'rows' | 'columns' | 'both';
  /** Compares every two rows, or columns, or each with `control`, by the same statistic; adjusted over all. */
  readonly compare?: 'rows' | 'columns';
  /** Label of the line that the others are compared with. */
  readonly control?: string;
  /** Cells: true goes up to the bound of `effort` and draws where that is not enough, false leaves them out; default: what is cheap. */
  readonly cells?: boolean;
  /** What the study held fixed. Default: both, as far as is known. */
  readonly fixed?: FixedSide;
  /** With one margin of a 2x2 table fixed: what makes an outcome as extreme. Default: the statistic. */
  readonly outcomeOrder?: OutcomeOrder;
  /** With one margin of a 2x2 table fixed: gamma of Berger & Boos (1994), in (0, 1). Default: none. */
  readonly nuisanceRisk?: number;
  /** How the statistic is spread by chance alone, in bins for a picture. Default: left out. */
  readonly nullSummary?: boolean;
  /** What a 2x2 table is tested against instead of none: "odds-ratio=2", "difference=-0.1", "ratio=1.25"; two values with a comma
   *  between for equivalence. Differences and ratios with `fixed` rows or columns. */
  readonly nullValue?: string;
  readonly method?: Method;
  /** Number of sampled tables, 1 to 1e12, or (the default) until p is settled against alpha. */
  readonly draws?: number | 'auto';
  /** For draws `auto`: most tables to draw, at least one block. Default 1e7. */
  readonly mostDraws?: number;
  /** For draws `auto`: probability that any interval ever shown misses; below alpha. Default alpha / 500. */
  readonly samplingRisk?: number;
  /** For draws `auto`: half the interval over its middle at which p is precise enough, 0 to 1. Default 0.02. */
  readonly relativeError?: number;
  readonly seed?: string;
  /** Part of a run with a fixed number of draws: every `of`-th block, from the `index`-th on (1 to `of`). */
  readonly shard?: Shard;
  /** Names the table among those of one run; its draws are keyed by seed and name. Default: the empty text. */
  readonly tableKey?: string;
  /** Bound on exact work in counted units. Default 6e7, about two seconds. */
  readonly effort?: number;
  /** Significance level that sentences compare with, in (0, 1). Default 0.05. */
  readonly alpha?: number;
  /** Level of intervals for effects, in (0, 1). Default 0.95. */
  readonly confidence?: number;
  /** Resampled tables for the interval of Cramer's V of a table larger than 2x2, 100 to 1e6. Default: no such interval. */
  readonly bootstrap?: number;
  /** Level of the interval of a sampled p, in (0, 1). Default 0.99. */
  readonly samplingConfidence?: number;
}

export interface Shard {
  readonly index: number;
  readonly of: number;
}

/** What was settled about the cells. */
export interface CellsEcho {
  /** The statistic that contributions add up to. */
  readonly contributionsTo: string;
  /** Asked for, however long. */
  readonly asked?: true;
  /** How the p of the cells is adjusted over all of them. */
  readonly adjustment: 'exact' | 'sample' | 'none';
  readonly reason: string;
  /** Where tables are drawn for the cells alone. */
  readonly draws?: number;
  readonly seed?: string;
}

export interface Plan {
  readonly statistic: string;
  /** Rows and columns are two answers of the same units. */
  readonly paired?: true;
  /** SHA-256 of the module of a statistic of the user's own. */
  readonly statisticDigest?: string;
  readonly tail: Tail;
  readonly twoSidedRule: TwoSidedRule | null;
  readonly method: ChosenMethod;
  /** Asked for, before `auto` was settled. */
  readonly methodAsked: Method;
  readonly methodReason: string;
  readonly forecast: PlannedForecast;
  readonly groups: 'rows' | 'columns' | null;
  readonly event: string | null;
  readonly reference: string | null;
  /** One for each row and column of the table, empty ones too; for statistics that take scores. */
  readonly rowScores?: number[];
  readonly columnScores?: number[];
  /** Over strata, where scores are ranks: within each stratum, or of all strata together. */
  readonly rowRanks?: 'midranks' | 'pooled-midranks';
  readonly columnRanks?: 'midranks' | 'pooled-midranks';
  /** In lowest terms, such as "2/3"; for power-divergence. */
  readonly lambda?: string;
  readonly ordered?: 'rows' | 'columns' | 'both';
  readonly compare?: 'rows' | 'columns';
  readonly control?: string;
  /** What the study fixed; or what chance leaves as it is: margins of every stratum, the clusters, the pairs. */
  readonly fixed: FixedSide | 'strata' | 'clusters' | 'pairs';
  /** These two for two groups of fixed size. */
  readonly outcomeOrder?: OutcomeOrder;
  readonly nuisanceRisk?: number;
  readonly nullValue?: StatedValue;
  readonly draws: number | 'auto' | null;
  /** These three for draws `auto` only. */
  readonly mostDraws?: number;
  readonly samplingRisk?: number;
  readonly relativeError?: number;
  /** Resampled tables of a bootstrap interval, where one was asked for. */
  readonly bootstrap?: number;
  readonly seed: string | null;
  readonly tableKey: string;
  readonly shard?: Shard;
  readonly generator: string | null;
  readonly blockSize: number | null;
  readonly effort: number;
  readonly alpha: number;
  readonly confidence: number;
  readonly samplingConfidence: number;
  readonly cells?: CellsEcho;
}

/** The ordering that a tail and rule call for; `doubled` is made from the two one-sided ones. */
export const orderingFor = (tail: Tail, rule: TwoSidedRule | null): readonly OrderingName[] =>
  tail !== 'both' ? [tail] : rule === 'doubled' || rule === null ? ['upper', 'lower'] : [rule];
