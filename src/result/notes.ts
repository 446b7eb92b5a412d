// Remarks that a reader of the result should not miss, each with a code that programs can look for.
import type { DesignKind } from '../plan/design.js';
import type { Plan } from '../plan/plan.js';
import type { PValueEntry } from '../pvalue/contract.js';
import { drawsToSettle } from '../pvalue/draws-to-settle.js';
import type { BoundStatistic, Statistic } from '../statistic/contract.js';
import type { Table } from '../table/table.js';
import { groupedDigits } from '../numeric/digit-groups.js';
import { quoted, shown } from './label-words.js';
import type { Note } from './result.js';

/** Lines without counts take no part in a test that holds the margins. */
export function emptyLineNotes(table: Table): Note[] {
  if (!table.rowTotals.includes(0) && !table.columnTotals.includes(0)) return [];
  const empty = [
    ...table.rowLabels.filter((_, i) => table.rowTotals[i] === 0).map((label) => `row ${quoted(label)}`),
    ...table.columnLabels.filter((_, j) => table.columnTotals[j] === 0).map((label) => `column ${quoted(label)}`),
  ];
  return [
    {
      code: 'empty-lines',
      text: `Left out because no unit falls into it (p is the same either way): ${empty.join(', ')}.`,
    },
  ];
}

export const onlyOneTable: Note = {
  code: 'only-one-table',
  text: 'These margins allow one table only, so chance has nothing to decide and p is 1.',
};

/** How far apart the approximation and the answer are: more than a factor of 1.5 either way is worth a remark. */
export function asymptoticNotes(
  headline: PValueEntry,
  asymptotic: PValueEntry | undefined,
  { limit, name }: Statistic,
): Note[] {
  if (headline.method === 'asymptotic') return [];
  if (asymptotic === undefined) {
    if (limit === 'none' && name !== 'probability') return [];
    return [
      {
        code: 'asymptotic-undefined',
        text: 'The asymptotic approximation has no value for this table and is left out.',
      },
    ];
  }
  if (headline.log10P === null || asymptotic.log10P === null) return [];
  const estimate = headline.method === 'sample' ? samplingEstimate(headline) : headline.log10P;
  if (estimate === undefined || Math.abs(estimate - asymptotic.log10P) <= Math.log10(1.5)) return [];
  const side = asymptotic.log10P < estimate ? 'smaller' : 'larger';
  return [
    {
      code: 'asymptotic-differs',
      text: `The asymptotic p is ${side} than the ${headline.method === 'sample' ? 'sampled' : 'exact'} one by more than a factor of 1.5: do not use it here.`,
    },
  ];
}

/** log10 of b/m where at least ten draws were as extreme; with fewer, sampling noise alone could pass the factor. */
function samplingEstimate(p: PValueEntry): number | undefined {
  const error = p.errors.find((one) => one.kind === 'sampling' || one.kind === 'sequential');
  return error === undefined || error.atLeast < 10 ? undefined : Math.log10(error.estimate);
}

/** What a reader should know of the statistic itself. */
export function statisticNotes({ own, name, words }: Statistic, bound: BoundStatistic | null): Note[] {
  if (own) {
    return [
      {
        code: 'own-statistic',
        text: `The statistic ${quoted(name)} (${shown(words)}) is not one of keepsum's: its values were compared as the doubles that its function gave, so that rounding inside it can part or join ties.`,
      },
    ];
  }
  if (bound?.linear === undefined) return [];
  const oneScore = [bound.linear.rowScores, bound.linear.columnScores].some((scores) => scores.every((x) => x === 0));
  if (!oneScore) return [];
  return [
    {
      code: 'one-score-only',
      text: 'All scores of a side are equal, so every table with these margins has the same trend and p is 1.',
    },
  ];
}

/** A sampled p whose interval still holds the level it will be compared with. */
export async function unsettledNotes(headline: PValueEntry, plan: Plan): Promise<Note[]> {
  const error = headline.errors.find((one) => one.kind === 'sampling');
  if (error?.kind !== 'sampling') return [];
  const [low, high] = error.interval;
  if (plan.alpha < low || plan.alpha > high) return [];
  const needed = await drawsToSettle(error.estimate, plan.alpha, plan.samplingConfidence);
  const more =
    needed === undefined || needed > 1e12
      ? 'more draws than can be made here would be needed to tell the side'
      : `about ${groupedDigits(needed)} draws (--draws ${needed}) should tell the side`;
  return [
    {
      code: 'level-inside-interval',
      text: `The interval of the sampled p holds the level ${plan.alpha}; ${more}, or an exact p.`,
    },
  ];
}

/** What a reader should know of the design that was declared. */
/** Of the score at a stated difference or ratio, whose constrained proportions are roots of a cubic or a quadratic. */
export const nearTiesNote: Note = {
  code: 'near-ties-counted',
  text: 'Outcomes whose score at the stated value lies within 1e-8 of the observed one count as tied: that can make p larger, never smaller.',
};

export function designNotes({ fixed, method }: Plan, table: Table, kind: DesignKind): Note[] {
  const isLarger = table.rowLabels.length > 2 || table.columnLabels.length > 2;
  if ((fixed === 'rows' || fixed === 'columns') && isLarger && method !== 'asymptotic') {
    const other = fixed === 'rows' ? 'column' : 'row';
    return [
      {
        code: 'conditional-p-stays-valid',
        text: `The study fixed the ${fixed === 'rows' ? 'row' : 'column'} totals only. The permutation p given both margins stays valid: it errs at most with probability alpha whatever the ${other} totals turn out to be, and so over all of them together.`,
      },
    ];
  }
  if (kind !== 'bootstrap') return [];
  return [
    {
      code: 'parametric-bootstrap',
      text: 'The headline p is a parametric bootstrap: the margins seen stand for the unknown proportions. It is an approximation and not guaranteed; the permutation p beside it is valid for a fixed total too.',
    },
  ];
}
