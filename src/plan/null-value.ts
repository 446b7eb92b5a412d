// A stated value other than none: what p is tested against, and what the other wishes must be for it.
import { noncentralWork } from '../null/stated-odds/noncentral-tails.js';
import { groupsSeen } from '../null/unconditional/outcomes.js';
import { nullValueWork } from '../null/unconditional/null-value-work.js';
import { dataProblem, usageProblem, type Problem } from '../problem/problem.js';
import type { Table } from '../table/table.js';
import { nullValueMeasures, type NullValueMeasure } from './null-value-measures.js';
import type { PlanOptions, TwoSidedRule } from './plan.js';
import { nameHint } from '../problem/suggest.js';
import { unused } from './settings.js';

/** One value, tested in one or both directions; or two that equivalence lies between (Schuirmann 1987). */
export type StatedValue =
  | { readonly of: NullValueMeasure; readonly value: number }
  | { readonly of: NullValueMeasure; readonly between: [number, number] };

/** "odds-ratio=2", "difference=-0.1", "ratio=0.8,1.25". @throws Problem (usage) `bad-null-value`, `unknown-value`. */
export function statedValue(text: string): StatedValue {
  const match = /^([a-z-]+)=([^,]+)(?:,([^,]+))?$/.exec(text.trim());
  if (match === null) throw badValue(text, 'is not a measure, an equals sign and one value or two');
  const [, name, first, second] = match as unknown as [string, string, string, string | undefined];
  const of = nullValueMeasures.find((measure) => measure === name);
  if (of === undefined) {
    throw usageProblem({
      code: 'unknown-value',
      message: `"${name}" is not a measure of --null-value`,
      place: '--null-value',
      hint: nameHint(name, nullValueMeasures),
    });
  }
  const value = valueOf(of, first, text);
  if (second === undefined) return { of, value };
  const upper = valueOf(of, second, text);
  if (upper <= value) throw badValue(text, 'names a pair that does not rise');
  return { of, between: [value, upper] };
}

function valueOf(of: NullValueMeasure, text: string, whole: string): number {
  const value = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,3})?$/i.test(text.trim()) ? Number(text) : NaN;
  if (of === 'difference') {
    if (value > -1 && value < 1) return value === 0 ? 0 : value;
    throw badValue(whole, 'names a difference that does not lie between -1 and 1');
  }
  if (value >= 1e-6 && value <= 1e6) return value;
  throw badValue(whole, `names ${of === 'ratio' ? 'a ratio' : 'an odds ratio'} that is not a number from 1e-6 to 1e6`);
}

const badValue = (text: string, what: string): Problem =>
  usageProblem({
    code: 'bad-null-value',
    message: `"${text}" ${what}`,
    place: '--null-value',
    hint: 'for example --null-value odds-ratio=2, difference=-0.1 or ratio=1.25; for equivalence two values: difference=-0.1,0.1',
  });

const only = (place: string, message: string, hint: string): Problem =>
  usageProblem({ code: 'null-value-with', message, place, hint });

/** What stands beside a test of no effect, and what such a p does not read. */
const unread = [
  'outcomeOrder',
  'nuisanceRisk',
  'ordered',
  'compare',
  'control',
  'bootstrap',
  'cells',
  'nullSummary',
] as const;

/** Defaults that a stated value brings with it. @throws Problem (usage) for wishes that do not go with it. */
export function withNullValue(table: Table, options: PlanOptions, text: string): PlanOptions {
  const stated = statedValue(text);
  const { of } = stated;
  if (options.paired) throw unused('--null-value', 'with --paired', 'leave it out; effects give intervals');
  if (table.rowLabels.length !== 2 || table.columnLabels.length !== 2) {
    throw usageProblem({
      code: 'not-two-by-two',
      message: `a stated ${of} compares two groups with two outcomes; this table is ${table.rowLabels.length} x ${table.columnLabels.length}`,
      place: '--null-value',
      hint: 'pick two rows and two columns, or leave --null-value out',
    });
  }
  for (const name of unread) {
    if (options[name] === undefined || options[name] === false) continue;
    throw unused(
      `--${name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`,
      'with --null-value',
      'leave it out',
    );
  }
  if (options.statistic !== undefined && options.statistic !== 'score') {
    throw only('--statistic', 'a stated value is tested by the score order alone', 'leave --statistic out');
  }
  if (options.method === 'sample' || options.method === 'asymptotic') {
    throw only(`--method ${options.method}`, 'the p of a stated value is exact', 'leave --method out');
  }
  const fixed = options.fixed ?? 'both';
  if (of === 'odds-ratio' && fixed !== 'both') {
    throw only(
      `--fixed ${fixed}`,
      'an odds ratio is tested given both margins, which stays valid where fewer were fixed',
      'leave --fixed out, or state a difference or a ratio',
    );
  }
  if (of !== 'odds-ratio' && fixed !== 'rows' && fixed !== 'columns') {
    throw only(
      '--null-value',
      `a ${of} of proportions is tested for two groups whose sizes the study fixed`,
      `add --fixed ${options.groups ?? 'rows'} if that is so, or state an odds ratio`,
    );
  }
  return { ...options, statistic: 'score', ...ruleFor(stated, options) };
}

function ruleFor(stated: StatedValue, { tail, twoSidedRule }: PlanOptions): Pick<PlanOptions, 'twoSidedRule'> {
  const isPair = 'between' in stated;
  if (isPair) {
    if (tail !== undefined && tail !== 'both')
      throw unused(`--tail ${tail}`, 'with two values: each is tested in one tail', 'leave it out, or state one value');
    if (twoSidedRule !== undefined)
      throw unused('--two-sided-rule', 'with two values: each is tested in one tail', 'leave it out');
    return {};
  }
  if (tail === 'upper' || tail === 'lower') return {};
  const rules: readonly TwoSidedRule[] =
    stated.of === 'odds-ratio' ? ['doubled', 'probability'] : ['distance', 'doubled'];
  const rule = twoSidedRule ?? rules[0]!;
  if (rules.includes(rule)) return { twoSidedRule: rule };
  throw only(
    '--two-sided-rule',
    `the two-sided rule ${rule} is not worked out for a stated ${stated.of}`,
    `use --two-sided-rule ${rules.join(' or ')}`,
  );
}

/** Counted work of all its p-values, and how many outcomes or tables there are. @throws Problem (data) for a group without units. */
export function statedWork(
  stated: StatedValue,
  counts: Parameters<typeof groupsSeen>[0],
): { workUnits: number; tables: number } {
  const seen = groupsSeen(counts);
  if (seen.firstSize === 0 || seen.secondSize === 0) {
    throw dataProblem({
      code: 'empty-group',
      message: 'a group has no units, so that nothing speaks for or against a stated value',
      hint: 'leave --null-value out, or compare groups that both hold counts',
    });
  }
  const values = 'between' in stated ? stated.between : [stated.value];
  if (stated.of === 'odds-ratio') {
    const each = values.map((value) => noncentralWork(seen, value));
    return { workUnits: each.reduce((sum, { workUnits }) => sum + workUnits, 0), tables: each[0]!.tables };
  }
  const tails = 'between' in stated ? 2 : 3;
  return {
    workUnits: tails * nullValueWork(seen),
    tables: (seen.firstSize + 1) * (seen.secondSize + 1),
  };
}
